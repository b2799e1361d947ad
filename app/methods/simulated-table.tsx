import { ScrollFrame } from '@/app/components/scroll-frame';
import { aimWords, CLAIM_WORDS, SIMULATED, sharePercent } from '@/lib/region/simulated-figures';
import styles from './page.module.css';

/** What `npm run validate` made of some claims. */
export function SimulatedTable({ claims, title }: { claims: readonly string[]; title: string }) {
  const figures = SIMULATED.figures.filter(({ claim }) => claims.includes(claim));
  if (figures.length === 0) return null;
  return (
    <ScrollFrame label={`${title}, simulated`} className={styles.scroll}>
      <table className={styles.table}>
        <caption>
          Simulated, with one standard error: 40 years a station, in regions 40 stations with correlation 0.5
        </caption>
        <thead>
          <tr>
            <th scope="col">How often</th>
            <th scope="col">by</th>
            <th scope="col">where</th>
            <th scope="col">simulated</th>
            <th scope="col">meant to be</th>
          </tr>
        </thead>
        <tbody>
          {figures.map((figure) => (
            <tr key={`${figure.claim} ${figure.of} ${figure.setting}`}>
              <td>{CLAIM_WORDS[figure.claim] ?? figure.claim}</td>
              <td>{figure.of}</td>
              <td>{figure.setting}</td>
              <td>
                {sharePercent(figure.value)} ± {sharePercent(figure.error)}
              </td>
              <td>{aimWords(figure)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}
