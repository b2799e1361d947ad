import { type Needle, sectorPath } from './needle.ts';
import styles from './needle-mark.module.css';

/** The map's mark as a small picture. Decoration beside words: give the words yourself (needleWords). */
export function NeedleMark({ needle, size = 28 }: { needle: Needle; size?: number }) {
  const { kind, side, significant, angle, share } = needle;
  const tone = kind === 'unranked' ? styles.unranked : styles[side];
  const fill = significant ? 'currentColor' : 'var(--paper)';
  return (
    <svg viewBox="-14 -14 28 28" width={size} height={size} aria-hidden="true" className={tone}>
      {kind === 'unranked' && (
        <circle r="6" fill="var(--paper)" stroke="currentColor" strokeWidth="1.4" strokeDasharray="2.2 2" />
      )}
      {kind === 'ranked' && share === undefined && <circle r="6" fill={fill} stroke="currentColor" strokeWidth="1.8" />}
      {kind === 'drying' && (
        <path
          d="M0-7.8 7.8 0 0 7.8-7.8 0Z"
          fill={fill}
          stroke="currentColor"
          strokeWidth="1.8"
          strokeLinejoin="round"
        />
      )}
      {kind !== 'unranked' && (
        <g transform={`rotate(${((angle * 180) / Math.PI).toFixed(1)})`}>
          <path d="M-13 0H13" stroke="currentColor" strokeWidth="2.2" strokeLinecap="round" />
          {share === undefined && <circle r="2.1" fill={significant ? 'var(--paper)' : 'currentColor'} />}
        </g>
      )}
      {kind === 'ranked' && share !== undefined && (
        <>
          <circle r="6.4" fill="var(--paper)" stroke="currentColor" strokeWidth="1.6" />
          <path d={sectorPath(share, 6.4)} fill="currentColor" />
        </>
      )}
    </svg>
  );
}
