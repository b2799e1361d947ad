import { aimWords, CLAIM_WORDS, type SimulatedFigure, sharePercent } from '../../lib/region/simulated-figures.ts';
import { isAsMeant } from './figure.ts';

/** The figures as a Markdown table. */
export function figuresTable(figures: readonly SimulatedFigure[]): string {
  const rows = figures.map((figure) => {
    const { claim, of, setting, value, error, cases } = figure;
    const mark = figure.aim === null ? '' : isAsMeant(figure) ? ' ✓' : ' ✗';
    return `| ${CLAIM_WORDS[claim] ?? claim} | ${of} | ${setting} | ${sharePercent(value)} ± ${sharePercent(error)} | ${cases} | ${aimWords(figure)}${mark} |`;
  });
  return ['| what | method | setting | simulated | cases | meant to be |', '|---|---|---|---|---|---|', ...rows].join(
    '\n',
  );
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
