import type { IntakeError, UnderstoodRow } from '../types.ts';

/** Points shown of a document before it is read. */
const SHOWN_POINTS = 20;

/** What a look at the first points of a document gathers. */
export class SeriesLook {
  readonly understood: UnderstoodRow[] = [];
  readonly preview: string[][] = [];
  readonly problems: IntakeError[] = [];

  /** True when no further point is shown. */
  get isFull(): boolean {
    return this.understood.length >= SHOWN_POINTS;
  }

  /** @param written     the point's fields as they stand in the document
   *  @param understood  what was made of them */
  show(written: string[], understood: UnderstoodRow): void {
    this.preview.push(written);
    this.understood.push(understood);
  }

  /** Keeps a problem, once. */
  note(problem: IntakeError): void {
    const same = (one: IntakeError) => one.problem.needs === problem.problem.needs && one.message === problem.message;
    if (!this.problems.some(same)) this.problems.push(problem);
  }
}
