/** A method as the methods page tells it: what is computed, from whom it is, and when not to lean on it. */
export interface MethodDefinition {
  /** place on the page, and what help links point to */
  id: string;
  title: string;
  /** what it does, in plain words, a paragraph each */
  says: string[];
  /** formulas in TeX, each with the words that explain its letters */
  formulas: { tex: string; where: string }[];
  assumes: string[];
  /** when not to trust it */
  distrust: string[];
  sources: string[];
  /** claims of `npm run validate` whose figures belong here */
  simulated?: string[];
}

export interface MethodChapter {
  title: string;
  methods: MethodDefinition[];
}
