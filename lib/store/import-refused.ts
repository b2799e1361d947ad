import type { IntakeError } from '../intake/types.ts';

/** A file that was read well and cannot be stored beside what is there. Tells the same as an IntakeError, and reads like
 *  one: file, value, what is wrong, what to do about it. Nothing of the import was taken. */
export class ImportRefused extends Error {
  override name = 'ImportRefused';
  constructor(readonly problem: IntakeError['problem']) {
    const value = problem.value === undefined ? '' : ` (“${problem.value}”)`;
    super(`${problem.file}: ${problem.message}${value}. ${problem.remedy}`);
  }
}
