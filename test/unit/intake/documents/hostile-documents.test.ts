import { performance } from 'node:perf_hooks';
import { expect, test } from 'vitest';
import { inspectFile } from '../../../../lib/intake/inspect-file.ts';
import { read, refusal, withFile } from '../reading.ts';
import { collection, daily, documentOf, point } from './waterml-2-text.ts';

const declared = (doctype: string, text: string) => text.replace('?>\n', `?>\n${doctype}\n`);
const good = collection({ points: daily(['1', '2', '3']) });

/** “Billion laughs”: ten entities, each ten times the one before. */
const LAUGHS = `<!DOCTYPE lolz [<!ENTITY l0 "lol">${Array.from(
  { length: 9 },
  (_, at) => `<!ENTITY l${at + 1} "${`&l${at};`.repeat(10)}">`,
).join('')}]>`;

test.each([
  ['an XML bomb', declared(LAUGHS, good.replace('>1<', '>&l9;<')), /declares entities of its own/],
  [
    'an external entity',
    declared('<!DOCTYPE c [<!ENTITY x SYSTEM "file:///etc/hostname">]>', good.replace('>1<', '>&x;<')),
    /declares entities/,
  ],
  ['a grammar from elsewhere', declared('<!DOCTYPE c SYSTEM "http://127.0.0.1:9/x.dtd">', good), /has a DOCTYPE/],
  ['an entity that nobody declared', good.replace('>1<', '>&x;<'), /not well-formed XML \(undefined entity/],
  ['elements far too deep', documentOf(`${'<a>'.repeat(5000)}${'</a>'.repeat(5000)}`), /more than 200 deep/],
  ['an endless text', documentOf(`<a>${'x'.repeat(3 << 20)}</a>`), /longer than 1024 kB/],
  ['an endless attribute', documentOf(`<a b="${'x'.repeat(3 << 20)}"/>`), /longer than 1024 kB/],
  [
    'endless comments in a text',
    documentOf(`<a>${`${'x'.repeat(9000)}<!-- -->`.repeat(200)}</a>`),
    /longer than 1024 kB/,
  ],
  ['an endless DOCTYPE', declared(`<!DOCTYPE c [${' '.repeat(3 << 20)}]>`, good), /longer than 1024 kB|DOCTYPE/],
  ['a document that is cut short', good.slice(0, good.indexOf('2001-01-03')), /is cut short/],
  ['a document cut within a tag', good.slice(0, good.indexOf('</wml2:time>') + 3), /is cut short|not well-formed/],
  ['tags that do not match', good.replace('</wml2:time>', '</wml2:tim>'), /not well-formed XML/],
  ['an encoding that nobody knows', good.replace('UTF-8', 'EBCDIC-7'), /names an encoding that is not known/],
])('%s is refused with file, row and remedy, and nothing is expanded', async (_what, text, message) => {
  const begun = performance.now();
  const { problem, message: words } = await refusal(text, { fileName: 'flows.xml' });
  expect(words).toMatch(message);
  expect(problem.file).toBe('flows.xml');
  expect(problem.row).toBeGreaterThan(0);
  expect(problem.remedy).not.toBe('');
  expect(performance.now() - begun).toBeLessThan(5000);
  const { mapping, problems } = await withFile(text, (path) => inspectFile(path, { fileName: 'flows.xml' }));
  expect([mapping, problems.length > 0]).toEqual([null, true]);
});

test('the row of a fault is that of the document', async () => {
  const lines = collection({ points: daily(['1', '2', '3']) }).split('\n');
  const at = lines.findIndex((line) => line.includes('2001-01-02'));
  lines[at] = lines[at].replace('</wml2:point>', '');
  expect((await refusal(lines.join('\n'))).problem.row).toBeGreaterThanOrEqual(at + 1);
});

const named = collection({ station: '0306', name: 'Brücke', points: daily(['1', '2']) });
const nameIn = async (bytes: Uint8Array) => (await read(bytes)).report.facts?.[0]?.name;
const utf16 = (text: string, big: boolean) => {
  const bytes = Buffer.from(`\ufeff${text}`, 'utf16le');
  return big ? bytes.swap16() : bytes;
};

test('documents are decoded by their mark, their declaration, else as UTF-8', async () => {
  const latin = Buffer.from(named.replace('UTF-8', 'ISO-8859-1'), 'latin1');
  expect(await nameIn(Buffer.from(named))).toBe('Brücke');
  expect(await nameIn(Buffer.from(`\ufeff${named}`))).toBe('Brücke');
  expect(await nameIn(latin)).toBe('Brücke');
  expect(await nameIn(utf16(named.replace('UTF-8', 'UTF-16'), false))).toBe('Brücke');
  expect(await nameIn(utf16(named.replace('UTF-8', 'UTF-16'), true))).toBe('Brücke');
  expect(await nameIn(Buffer.from(named.replace(/<\?xml.*\?>/, '')))).toBe('Brücke');
});

test('bytes that the declared encoding does not have are refused with their row', async () => {
  const { problem } = await refusal(Buffer.from(named, 'latin1'), { fileName: 'flows.xml' });
  const row = named.slice(0, named.indexOf('Brücke')).split('\n').length;
  expect(problem).toMatchObject({ file: 'flows.xml', row });
  expect(problem.message).toMatch(/not the UTF-8/);
});

test('a document that calls itself UTF-16 and is UTF-8 is read, with a warning', async () => {
  const { report } = await read(Buffer.from(named.replace('UTF-8', 'UTF-16')));
  expect(report.facts?.[0]?.name).toBe('Brücke');
  expect(report.warnings.join()).toMatch(/says “UTF-16” and was read as UTF-8/);
});

test('a character cut in two between pieces of the file is one character', async () => {
  // Pieces are of 64 kB: the comment moves the name over each of their borders.
  for (let shift = 0; shift < 4; shift++) {
    const comment = `<!--${'x'.repeat(65_530 - named.indexOf('Brücke') + shift)}-->`;
    const text = named.replace('?>\n', `?>\n${comment}`);
    expect(await nameIn(Buffer.from(text))).toBe('Brücke');
  }
});

test('more qualifiers than a byte can tell apart are refused, and can be left out', async () => {
  const points = Array.from({ length: 300 }, (_, at) =>
    point(
      `2001-${String(1 + Math.floor(at / 28)).padStart(2, '0')}-${String(1 + (at % 28)).padStart(2, '0')}`,
      '1',
      `<wml2:qualifier xlink:title="q${at}"/>`,
    ),
  );
  const text = collection({ points });
  expect((await refusal(text)).problem).toMatchObject({ needs: 'mapping' });
  expect((await read(text, { mapping: { flag: null } })).report.accepted).toBe(300);
});

test('reading stops when it is told to', async () => {
  const text = collection({ points: daily(['1', '2']) });
  await expect(read(text, { signal: AbortSignal.abort(new Error('stop')) })).rejects.toThrow('stop');
});
