import { type FileHead, LONGEST_LINE, lineEndOf, longLineError } from '../file-blocks.ts';
import { hasUtf8Mark, refuseUnlessText } from '../text-encoding.ts';
import { type InspectOptions, IntakeError } from '../types.ts';
import { commentSign, isComment } from './comment-lines.ts';
import { planCalendar } from './plan-calendar.ts';
import { isSettled, planColumns } from './plan-columns.ts';
import { planFixedWidth } from './plan-fixed.ts';
import { detectDelimiter, sampleLines } from './sample.ts';
import type { TablePlan } from './table-plan.ts';

/** Recognises a file by its content and lays over it what was given.
 *  @returns a plan; what is still to be answered stands in its `problems`
 *  @throws IntakeError for a file that cannot be read whatever is answered, or has no recognisable rows */
export function recognise(head: FileHead, options: InspectOptions): TablePlan {
  const file = options.fileName;
  refuseUnlessText(head.bytes, file);
  const lineEnd = lineEndOf(head.bytes);
  const wholeFile = head.bytes.length >= head.size;
  if (head.bytes.length >= LONGEST_LINE && !head.bytes.includes(lineEnd)) throw longLineError(file, 1, head.bytes);
  const lines = sampleLines(head.bytes, lineEnd, wholeFile);
  const sign = commentSign(lines);
  const body = lines.filter(({ text }) => !isComment(text, sign));
  if (body.length === 0) {
    throw new IntakeError({
      file,
      message: lines.length > 0 ? 'the file holds nothing but comment lines' : 'the file holds nothing but blank lines',
      remedy: 'Export it again with its rows of data',
    });
  }
  refuseMarkup(body[0].text, body[0].line, file);
  const openLine = wholeFile ? null : head.bytes.subarray(head.bytes.lastIndexOf(lineEnd) + 1);
  const context = {
    ...{ options, openLine, lineEnd, marked: hasUtf8Mark(head.bytes) },
    comments: lines.filter(({ text }) => isComment(text, sign)),
    sign,
  };
  const asked = options.mapping?.layout;
  if (asked === 'fixed-width') return planFixedWidth(body, context) as TablePlan;
  const delimiter = asked === 'whitespace' ? null : (options.mapping?.delimiter ?? detectDelimiter(body, lineEnd));
  const calendar = planCalendar(body, delimiter, context);
  if (calendar !== null) return calendar;
  if (delimiter !== null || asked !== undefined) return planColumns(body, delimiter, context);
  const fixed = () => planFixedWidth(body, context);
  try {
    const blanks = planColumns(body, null, context);
    return isSettled(blanks, body) ? blanks : (fixed() ?? blanks);
  } catch (problem) {
    const plan = fixed();
    if (plan) return plan;
    throw problem;
  }
}

function refuseMarkup(text: string, row: number, file: string): void {
  const kind = /^\s*[{[]/.test(text) ? 'JSON' : /^\s*<[?!a-z]/i.test(text) ? 'XML or HTML' : null;
  if (kind === null) return;
  throw new IntakeError({
    file,
    row,
    value: text.slice(0, 60),
    message: `this is ${kind}, which is not read for flows`,
    remedy: 'Get the data as a table: CSV, tab-delimited or fixed width',
  });
}
