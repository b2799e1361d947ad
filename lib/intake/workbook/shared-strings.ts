import { IntakeError } from '../types.ts';
import type { WorkbookPackage } from './package.ts';

/** Characters of shared texts that are held: 200 MB of them at one byte each. */
const MOST_CHARACTERS = 200e6;

/** The texts that the cells of a workbook refer to by number.
 *  @throws IntakeError when they are more than can be held */
export async function sharedStrings(workbook: WorkbookPackage, part: string | null, signal?: AbortSignal) {
  const texts: string[] = [];
  if (part === null || !workbook.has(part)) return texts;
  let text = '';
  let characters = 0;
  // What tells how a text is pronounced stands beside it and is none of it.
  let aside = 0;
  await workbook.read(
    part,
    {
      open(name) {
        if (name === 'si') text = '';
        else if (name === 'rPh') aside++;
      },
      close(name, content) {
        if (name === 'rPh') aside--;
        else if (name === 't' && aside === 0) text += content;
        else if (name === 'si') {
          texts.push(text);
          characters += text.length + 8;
          if (characters > MOST_CHARACTERS) throw tooMany(workbook.file);
        }
      },
    },
    signal,
  );
  return texts;
}

function tooMany(file: string): IntakeError {
  return new IntakeError({
    file,
    message: `the workbook holds more than ${MOST_CHARACTERS / 1e6} MB of different texts`,
    remedy: 'Save the sheet as CSV and import that',
  });
}
