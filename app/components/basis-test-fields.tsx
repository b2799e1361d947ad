import type { Basis } from '@/lib/basis';
import { FALSE_ALARM_LAGS, falseAlarmsOf, sharePercent } from '@/lib/region/simulated-figures';
import styles from './basis-editor.module.css';
import { Choices, NumberField } from './basis-fields.tsx';
import type { FieldsProps } from './basis-year-fields.tsx';
import ui from './ui.module.css';

/** Each correction by what it does. */
const CORRECTIONS: readonly (readonly [Basis['serialCorrection'], string, string])[] = [
  ['ar1-regional', 'Carry-over shared by the region', 'Each station’s is drawn towards the mean of all stations.'],
  ['ar1', 'Carry-over of each station', 'Noisier with short records.'],
  ['all-lags', 'Every significant lag of each station', 'As published in 1998 (Hamed & Rao).'],
  ['pre-whitened', 'Carry-over taken out of the series', 'The trend is put back first (trend-free pre-whitening).'],
  ['block-bootstrap', 'Resampled blocks of years', '2,000 times, from a fixed seed.'],
  ['none', 'Not corrected', 'As if every year stood alone.'],
];

/** Each correction as it is chosen by. Example: "ar1" → "Carry-over of each station" */
export const correctionName = (wanted: string): string | undefined =>
  CORRECTIONS.find(([correction]) => correction === wanted)?.[1];

export const asPercent = (value: number): number => Number((value * 100).toFixed(4));

/** The serial correction, each with the false alarms that it lets through, and the false discoveries accepted. */
export function TestFields({ basis }: FieldsProps) {
  return (
    <>
      <Choices
        name="serialCorrection"
        legend="Mann–Kendall, corrected for lows that carry over from year to year"
        value={basis.serialCorrection}
        options={CORRECTIONS.map(([correction, words, meaning]) => [
          correction,
          words,
          <>
            {meaning} <AlarmRates of={correction} />
          </>,
        ])}
      />
      <p className={ui.hint}>
        False alarms are simulated: how often a trend is found at a nominal 5 % in 40 years that have none, where
        neighbouring years correlate by {FALSE_ALARM_LAGS.join(' / ')}.
      </p>
      <NumberField name="alpha" label="False discoveries accepted" value={asPercent(basis.alpha)} unit="%">
        Of the stations called falling or rising, at most this share is expected to be so by chance.
      </NumberField>
    </>
  );
}

/** Example: "False alarms 4.0 / 5.6 / 6.0 %" */
function AlarmRates({ of }: { of: Basis['serialCorrection'] }) {
  const alarms = falseAlarmsOf(of);
  if (alarms.length === 0) return null;
  const shares = alarms.map(({ share }) => sharePercent(share).replace(/\s?%$/, ''));
  return <span className={styles.rates}>False alarms {shares.join(' / ')} %.</span>;
}
