/** What a table by file name says of a file. A name comes from outside: one that every object inherits ("constructor") is
 *  in the table only where it was put there. */
export function byFileName<Value>(table: Readonly<Record<string, Value>>, name: string): Value | undefined {
  return Object.hasOwn(table, name) ? table[name] : undefined;
}
