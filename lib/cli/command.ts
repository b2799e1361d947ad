/** What the set-up lends to a command. */
export interface Host {
  /** reload code as it changes, without a build */
  dev: boolean;
  /** makes the production build of the site unless it is there */
  build(): Promise<void>;
  /** makes the invented demo region */
  seedDemo(): Promise<void>;
}

/** A batch command, one module each in ./commands. */
export interface Command {
  usage: string;
  /** true when the command brings the database up to date by itself, or must not touch it first */
  withoutDatabase?: boolean;
  /** @param argv  the words after the command's name
   *  @returns     exit code
   *  @throws UsageError for wrong usage (exit 2); anything else that is thrown is a failure (exit 1) */
  run(argv: string[], host: Host): Promise<number>;
}
