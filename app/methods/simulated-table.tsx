import { correctionName } from '@/app/components/basis-test-fields';
import { ScrollFrame } from '@/app/components/scroll-frame';
import { aimWords, CLAIM_WORDS, SIMULATED, type SimulatedFigure, sharePercent } from '@/lib/region/simulated-figures';
import styles from './page.module.css';

const distinct = (words: readonly string[]): string[] => [...new Set(words)];

/** What `npm run validate` made of some claims, a table each: methods down, settings across. */
export function SimulatedTables({ claims }: { claims: readonly string[] }) {
  return claims.map((claim) => {
    const figures = SIMULATED.figures.filter((figure) => figure.claim === claim);
    return figures.length > 0 && <ClaimTable key={claim} claim={claim} figures={figures} />;
  });
}

function ClaimTable({ claim, figures }: { claim: string; figures: readonly SimulatedFigure[] }) {
  const settings = distinct(figures.map(({ setting }) => setting));
  const title = `Simulated: ${CLAIM_WORDS[claim] ?? claim}`;
  return (
    <ScrollFrame label={title} className={styles.scroll}>
      <table className={styles.table}>
        <caption>{title}</caption>
        <thead>
          <tr>
            <th scope="col">method</th>
            {settings.map((setting) => (
              <th scope="col" key={setting}>
                {setting}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {distinct(figures.map(({ of }) => of)).map((of) => (
            <tr key={of}>
              <th scope="row">{methodWords(of)}</th>
              {settings.map((setting) => (
                <td key={setting}>
                  <Cell figure={figures.find((one) => one.of === of && one.setting === setting)} />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}

const CHANCE_WORDS: Readonly<Record<string, string>> = {
  permutation: 'Years shuffled',
  sieve: 'Years drawn anew',
};

/** What was simulated, by the names under which it is chosen. Example: "ar1" → "Carry-over of each station (ar1)" */
function methodWords(of: string): string {
  const named = of.split(', ').map((part) => correctionName(part) ?? CHANCE_WORDS[part]);
  return named.some((name) => name === undefined) ? of : `${named.join(', ')} (${of})`;
}

function Cell({ figure }: { figure: SimulatedFigure | undefined }) {
  if (!figure) return '–';
  const aim = aimWords(figure);
  return (
    <>
      {sharePercent(figure.value)} <span className={styles.error}>± {(figure.error * 100).toFixed(1)}</span>
      {aim && <span className={styles.aim}>meant: {aim}</span>}
    </>
  );
}
