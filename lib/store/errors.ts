/** What kept the store from doing what it was asked. The message is one plain line, fit for the terminal; `code` is for
 *  programs. Messages may name files: a web answer gives its own words for the code instead. */
export type StoreProblem =
  | 'missing'
  | 'unwritable'
  | 'not-a-database'
  | 'not-hungerstone'
  | 'newer'
  | 'bad-url'
  | 'bad-input'
  | 'exists'
  | 'not-found'
  | 'in-use'
  | 'needed'
  | 'changed'
  | 'lost';

export class StoreError extends Error {
  override name = 'StoreError';
  constructor(
    readonly code: StoreProblem,
    message: string,
    options?: ErrorOptions,
  ) {
    super(message, options);
  }
}
