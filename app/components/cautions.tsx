import Link from 'next/link';
import styles from './cautions.module.css';

/** What stands under every result. */
export function Cautions() {
  return (
    <details className={styles.cautions}>
      <summary>
        Screening values for planning. A trend is not a cause, and no significant trend is not no change.{' '}
        <span className={styles.more}>More cautions</span>
      </summary>
      <ul>
        <li>
          Permit limits, water rights, reservoir rules and safety decisions need the responsible authority’s method and
          a licensed professional; local codes come first.
        </li>
        <li>Provisional data may change. Lows affected by ice are estimates; a new rating or weir makes a step.</li>
        <li>Low flows are measured to 10–20 % at best. Short or variable stations crowd both ends of any ranking.</li>
        <li>Spells of several decades can look like a trend, and no test here rules that out.</li>
        <li>
          <Link href="/methods" prefetch={false}>
            Methods, their sources, and when not to trust them
          </Link>
        </li>
      </ul>
    </details>
  );
}
