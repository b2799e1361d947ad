import { type ParseArgsConfig, parseArgs } from 'node:util';
import { UsageError } from './usage-error.ts';

type Options = NonNullable<ParseArgsConfig['options']>;

/** Reads a command's options and operands.
 *  @param argv      the words after the command's name
 *  @param options   as node:util parseArgs takes them
 *  @param operands  how many words without a dash there must be, and what they are: `{ name: 'FLOWFILE', min: 1 }`;
 *                   without it none is allowed
 *  @throws UsageError that names the word that is wrong and says what would do */
export function readArguments<const T extends Options>(
  argv: string[],
  options: T,
  operands: { name: string; min?: number; max?: number } = { name: '', max: 0 },
) {
  const parsed = parse(argv, options);
  const { name, min = 0, max = Number.POSITIVE_INFINITY } = operands;
  const given = parsed.positionals;
  if (given.length > max) {
    throw new UsageError(`"${given[max]}" is one word too many${max ? `: give ${max} ${name}` : ''}.`);
  }
  if (given.length < min) throw new UsageError(`Give ${min > 1 ? `at least ${min} × ` : ''}${name}.`);
  return parsed;
}

function parse<const T extends Options>(argv: string[], options: T) {
  try {
    return parseArgs({ args: argv, options, allowPositionals: true, strict: true });
  } catch (error) {
    const known = Object.keys(options).map((option) => `--${option}`);
    const said = error instanceof Error ? error.message.split('. ')[0] : String(error);
    throw new UsageError(`${said}. The options are ${known.join(', ') || 'none'}.`, { cause: error });
  }
}

/** An option's text as a whole number.
 *  @throws RangeError as UsageError when it is not one, or lies outside min..max */
export function wholeNumber(option: string, text: string, min: number, max: number): number {
  const value = Number(text);
  if (text.trim() === '' || !Number.isInteger(value) || value < min || value > max) {
    throw new UsageError(`${option} takes a whole number ${min}–${max}, not "${text}".`);
  }
  return value;
}

/** The format of a table whose rows are no places.
 *  @throws UsageError for another one */
export function plainFormat(format: string): 'csv' | 'json' {
  if (format === 'csv' || format === 'json') return format;
  throw new UsageError(`--format takes csv or json here, not "${format}".`);
}
