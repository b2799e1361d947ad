import type { MarkedChange } from '@/app/components/change-marks/marked-changes';
import { count, flowIn, range, significant, UNIT_WORDS, type Units } from '@/app/components/format';
import { apiHref } from '@/app/components/links';
import ui from '@/app/components/ui.module.css';
import { isoDate } from '@/lib/calendar/day';
import type { BesideFlow } from '@/lib/jobs/beside-flow';
import type { Quantity } from '@/lib/series/quantities';
import { BesideFigure } from './beside-figure';
import styles from './station-screen.module.css';

const NAMES: Record<Quantity, string> = {
  flow: 'Flow',
  stage: 'Stage',
  rainfall: 'Rainfall',
  'potential-evaporation': 'Potential evaporation',
};
/** The longest stretch that is answered at once, days. */
const MOST_DAYS = 36_525;

interface Props {
  slug: string;
  code: string;
  beside: readonly BesideFlow[];
  changes: readonly MarkedChange[];
  units: Units;
}

/** Daily records kept beside the flow: each drawn small over the flow of the same days. */
export function BesideFigures({ slug, code, beside, changes, units }: Props) {
  if (beside.length === 0) return null;
  return (
    <section className={styles.beside} aria-labelledby="beside-title">
      <h2 id="beside-title">Kept beside the flow</h2>
      {beside.map((record) => {
        const { quantity, unit, firstDay, lastDay, valueCount, lowest, highest } = record;
        const shownUnit = quantity === 'stage' ? unit : `${unit} a day`;
        const days = new URLSearchParams({
          ...{ quantity, first: isoDate(firstDay), last: isoDate(Math.min(lastDay, firstDay + MOST_DAYS - 1)) },
          format: 'csv',
        });
        const words = `${isoDate(firstDay)} to ${isoDate(lastDay)}, ${count(valueCount, 'day')} with a value, ${range(significant(lowest), significant(highest))} ${shownUnit}`;
        return (
          <div key={quantity}>
            <div className={styles.sectionHead}>
              <h3>
                {NAMES[quantity]}, {shownUnit}
              </h3>
              <a
                className={ui.button}
                href={`${apiHref(slug, `stations/${encodeURIComponent(code)}/days`, '')}?${days}`}
                download
              >
                {NAMES[quantity]} CSV
              </a>
            </div>
            <BesideFigure
              {...record}
              changes={changes}
              flowFactor={flowIn(1, units) ?? 1}
              flowUnit={UNIT_WORDS[units].flow}
              unitText={shownUnit}
              summary={`${NAMES[quantity]}: ${words}.`}
            />
            <p className={styles.caption}>{words}.</p>
          </div>
        );
      })}
    </section>
  );
}
