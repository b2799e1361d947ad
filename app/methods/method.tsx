import { ScrollFrame } from '@/app/components/scroll-frame';
import type { MethodDefinition } from '@/lib/region/methods/definition';
import { Formula } from './formula.tsx';
import styles from './page.module.css';
import { SimulatedTables } from './simulated-table.tsx';

/** One method: what it does, its formulas, what it assumes, when not to trust it, whose it is. */
export function Method({ method }: { method: MethodDefinition }) {
  const { id, title, says, formulas, assumes, distrust, sources, simulated = [] } = method;
  return (
    <section id={id} className={styles.method} aria-labelledby={`${id}-title`}>
      <h3 id={`${id}-title`}>
        <a href={`#${id}`}>{title}</a>
      </h3>
      {says.map((paragraph) => (
        <p key={paragraph}>{paragraph}</p>
      ))}
      {formulas.map(({ tex, where }, i) => (
        <figure key={tex} className={styles.formula}>
          <ScrollFrame label={`Formula ${i + 1} of ${title}`} className={styles.scroll}>
            <Formula tex={tex} />
          </ScrollFrame>
          <figcaption>{where}</figcaption>
        </figure>
      ))}
      <Points title="It assumes" points={assumes} />
      <Points title="Do not lean on it" points={distrust} />
      <SimulatedTables claims={simulated} />
      <Points title="Sources" points={sources} small />
    </section>
  );
}

function Points({ title, points, small = false }: { title: string; points: readonly string[]; small?: boolean }) {
  if (points.length === 0) return null;
  return (
    <div className={small ? styles.sources : styles.points}>
      <h4>{title}</h4>
      <ul>
        {points.map((point) => (
          <li key={point}>{point}</li>
        ))}
      </ul>
    </div>
  );
}
