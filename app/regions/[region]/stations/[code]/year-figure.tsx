'use client';
import type { ReactNode, Ref } from 'react';
import styles from './year-figure.module.css';
import type { useYearReader } from './year-reader';
import { YearSlider } from './year-slider';

interface Props {
  frame: Ref<HTMLDivElement>;
  width: number;
  height: number;
  /** colour of a slope line */
  tone?: 'dry' | 'wet' | 'none';
  axisName: string;
  /** the whole figure in words */
  summary: string;
  span: [number, number];
  reader: ReturnType<typeof useYearReader>;
  /** what the year picked says; null while none is */
  text: string | null;
  yearAt(pixels: number): number;
  /** what the marks mean: stands where a year is read out else */
  meaning: ReactNode;
  /** what is drawn */
  children: ReactNode;
}

/** The frame of a figure with one mark a year: what its axes are called, the drawing as one control, and below it the year
 *  that is read out. */
export function YearFigure({
  frame,
  width,
  height,
  tone = 'none',
  axisName,
  summary,
  span,
  reader,
  text,
  yearAt,
  meaning,
  children,
}: Props) {
  return (
    <div ref={frame} className={styles.frame} data-tone={tone}>
      <p className={styles.axisName}>{axisName}</p>
      <YearSlider
        label={summary}
        span={span}
        year={text === null ? null : reader.picked}
        text={text}
        yearAt={yearAt}
        onYear={reader.pickNearest}
        onKeyDown={reader.onKeyDown}
        onLeave={reader.clear}
      >
        <svg className={styles.figure} width={width} height={height} aria-hidden="true">
          {children}
        </svg>
      </YearSlider>
      <div className={styles.readout}>{text ?? <div className={styles.meaning}>{meaning}</div>}</div>
    </div>
  );
}

/** Said after the meaning of the marks; of no use on paper. */
export function ByArrowKeys() {
  return <span className={styles.onScreen}>The arrow keys read single years.</span>;
}
