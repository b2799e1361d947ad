import 'katex/dist/katex.min.css';
import type { Metadata } from 'next';
import { Cautions } from '@/app/components/cautions';
import { Header } from '@/app/components/header';
import { METHOD_CHAPTERS } from '@/lib/region/methods/all';
import { METHODS_VERSION } from '@/lib/region/methods-version';
import { Method } from './method.tsx';
import styles from './page.module.css';

export const metadata: Metadata = { title: 'Methods' };

/** Every figure of the program: its formula, its source, what it assumes and when not to trust it. */
export default function MethodsPage() {
  return (
    <>
      <Header />
      <main id="main" className={styles.main}>
        <header className={styles.opening}>
          <h1>Methods</h1>
          <p>
            How each figure is made, from whom the method is, what it assumes, and when not to lean on it. Methods
            version {METHODS_VERSION}; it rises with any figure that would come out otherwise. What is simulated stands
            with one standard error: series of 40 years, regions of 40 stations that share weather with a correlation of
            0.5, where the truth is known.
          </p>
        </header>
        <nav aria-label="Methods" className={styles.contents}>
          {METHOD_CHAPTERS.map(({ title, methods }) => (
            <div key={title}>
              <b>{title}</b>
              <ul>
                {methods.map((method) => (
                  <li key={method.id}>
                    <a href={`#${method.id}`}>{method.title}</a>
                  </li>
                ))}
              </ul>
            </div>
          ))}
        </nav>
        {METHOD_CHAPTERS.map(({ title, methods }) => (
          <section key={title} aria-label={title} className={styles.chapter}>
            <h2>{title}</h2>
            {methods.map((method) => (
              <Method key={method.id} method={method} />
            ))}
          </section>
        ))}
        <Cautions />
      </main>
    </>
  );
}
