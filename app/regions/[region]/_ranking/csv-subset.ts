/** The records of a CSV text (RFC 4180: quoted fields may hold commas, quotes and line ends), each as its own text. */
export function csvRecords(text: string): string[] {
  const records: string[] = [];
  let quoted = false;
  let start = 0;
  for (let i = 0; i < text.length; i++) {
    if (text[i] === '"') quoted = !quoted;
    else if (text[i] === '\n' && !quoted) {
      records.push(text.slice(start, i + 1));
      start = i + 1;
    }
  }
  if (start < text.length) records.push(text.slice(start));
  return records;
}

/** The fields of one record, unquoted. */
export function csvFields(record: string): string[] {
  const text = record.replace(/\r?\n$/, '');
  const fields: string[] = [];
  let quoted = false;
  let start = 0;
  for (let i = 0; i <= text.length; i++) {
    if (text[i] === '"') quoted = !quoted;
    else if (i === text.length || (text[i] === ',' && !quoted)) {
      fields.push(unquoted(text.slice(start, i)));
      start = i + 1;
    }
  }
  return fields;
}

const unquoted = (field: string): string => (field.startsWith('"') ? field.slice(1, -1).replaceAll('""', '"') : field);

/** The table with only the rows of these stations, every kept row byte for byte as it was, header first.
 *  @throws RangeError when the table has no station_code column */
export function csvOfStations(text: string, codes: ReadonlySet<string>): string {
  const [header, ...rows] = csvRecords(text);
  const column = csvFields(header ?? '').indexOf('station_code');
  if (column < 0) throw new RangeError('csvOfStations: text has no column station_code');
  return header + rows.filter((row) => codes.has(csvFields(row)[column])).join('');
}
