import { aimWords, CLAIM_WORDS, type SimulatedFigure, sharePercent } from '../../lib/region/simulated-figures.ts';
import { isAsMeant } from './figure.ts';

const distinct = (words: readonly string[]): string[] => [...new Set(words)];

function cell(figure: SimulatedFigure | undefined): string {
  if (!figure) return '';
  const text = `${sharePercent(figure.value)} ± ${(figure.error * 100).toFixed(1)}`;
  return figure.aim === null ? text : `${text} (${aimWords(figure)} ${isAsMeant(figure) ? '✓' : '✗'})`;
}

/** The figures in Markdown, a table for each claim: methods down, settings across. */
export function figuresTable(figures: readonly SimulatedFigure[]): string {
  const tables = distinct(figures.map(({ claim }) => claim)).map((claim) => {
    const own = figures.filter((figure) => figure.claim === claim);
    const settings = distinct(own.map(({ setting }) => setting));
    const rows = distinct(own.map(({ of }) => of)).map((of) => {
      const cells = settings.map((setting) => cell(own.find((one) => one.of === of && one.setting === setting)));
      return `| ${of} | ${cells.join(' | ')} |`;
    });
    const head = [
      `| ${CLAIM_WORDS[claim] ?? claim} | ${settings.join(' | ')} |`,
      `|---|${'---|'.repeat(settings.length)}`,
    ];
    return [...head, ...rows].join('\n');
  });
  return tables.join('\n\n');
}

const BEGIN = '<!-- simulated figures: written by npm run validate -- --write -->';
const END = '<!-- end of simulated figures -->';

/** A text with the table between its two marks.
 *  @throws RangeError when the marks are not there */
export function withTable(text: string, table: string): string {
  const from = text.indexOf(BEGIN);
  const to = text.indexOf(END);
  if (from < 0 || to < from) throw new RangeError('withTable: the text must hold both marks of the simulated figures');
  return `${text.slice(0, from)}${BEGIN}\n\n${table}\n\n${text.slice(to)}`;
}
