import { seeded } from '../../seeded.ts';

/** Texts at which readers are apt to stumble. */
const TOKENS = [
  ...['\0', '"', '""', ',', ';', '\t', '\r', '\n', '\r\n', '\n\n', '#', '<', '>', '&amp;', '<![CDATA[', '-->', ']]>'],
  ...[
    'NaN',
    'Infinity',
    '-0',
    '1e999',
    '1e-999',
    '-999.00',
    '0x10',
    '1,234.5',
    '1.234,5',
    '٣',
    '½',
    '−1',
    '1'.repeat(400),
  ],
  ...['0000-00-00', '9999-12-31', '1900-02-29', '29.02.2000', '31/12/99', '2001-02-30', '24:00', '24:60:99', '+25:00'],
  ...[
    '\uFEFF',
    '\u2028',
    '\u202E',
    '\uD800',
    'ß',
    'İ',
    'null',
    'undefined',
    '__proto__',
    'constructor',
    '{}',
    '[]',
    '../../x',
  ],
  ...['<!DOCTYPE x [<!ENTITY a "b">]>', '&a;', '<?xml version="1.1" encoding="utf-16"?>', 'PK\x03\x04', '\x1f\x8b'],
];
const encoder = new TextEncoder();

type Random = () => number;
type Mutation = (bytes: Uint8Array, random: Random, other: Uint8Array) => Uint8Array;

const at = (random: Random, length: number): number => Math.floor(random() * Math.max(1, length));
const join = (...pieces: Uint8Array[]): Uint8Array => Uint8Array.from(Buffer.concat(pieces));
/** A stretch, mostly short. */
function stretch(random: Random, length: number): [number, number] {
  const start = at(random, length);
  return [start, Math.min(length, start + 1 + Math.floor(random() ** 4 * length))];
}

const MUTATIONS: readonly Mutation[] = [
  // a bit turned, a byte replaced
  (bytes, random) => {
    const out = bytes.slice();
    if (out.length > 0) out[at(random, out.length)] ^= 1 << at(random, 8);
    return out;
  },
  (bytes, random) => {
    const out = bytes.slice();
    if (out.length > 0) out[at(random, out.length)] = at(random, 256);
    return out;
  },
  // cut short, a stretch gone, a stretch twice, a stretch moved
  (bytes, random) => bytes.slice(0, at(random, bytes.length + 1)),
  (bytes, random) => {
    const [from, to] = stretch(random, bytes.length);
    return join(bytes.subarray(0, from), bytes.subarray(to));
  },
  (bytes, random) => {
    const [from, to] = stretch(random, bytes.length);
    return join(bytes.subarray(0, to), bytes.subarray(from));
  },
  (bytes, random) => {
    const [from, to] = stretch(random, bytes.length);
    const rest = join(bytes.subarray(0, from), bytes.subarray(to));
    const place = at(random, rest.length);
    return join(rest.subarray(0, place), bytes.subarray(from, to), rest.subarray(place));
  },
  // a text put in, or in the place of a stretch
  (bytes, random) => {
    const place = at(random, bytes.length);
    return join(bytes.subarray(0, place), encoder.encode(TOKENS[at(random, TOKENS.length)]), bytes.subarray(place));
  },
  (bytes, random) => {
    const [from, to] = stretch(random, bytes.length);
    return join(bytes.subarray(0, from), encoder.encode(TOKENS[at(random, TOKENS.length)]), bytes.subarray(to));
  },
  // every sign of one kind become another
  (bytes, random) => {
    const signs = [...',;\t.\n\r "-/:<>01'].map((sign) => sign.charCodeAt(0));
    const [from, to] = [signs[at(random, signs.length)], signs[at(random, signs.length)]];
    return bytes.map((byte) => (byte === from ? to : byte));
  },
  // the head of one file on the tail of another
  (bytes, random, other) => join(bytes.subarray(0, at(random, bytes.length)), other.subarray(at(random, other.length))),
];

/** Spoils a file in one to four ways, the same for the same seed.
 *  @param other  a second file, to be spliced in */
export function mutate(bytes: Uint8Array, seed: number, other: Uint8Array): Uint8Array {
  const random = seeded(seed);
  // A copy: slice() of a Buffer would share its memory.
  let out: Uint8Array = Uint8Array.from(bytes);
  const times = 1 + at(random, 4);
  for (let i = 0; i < times; i++) out = MUTATIONS[at(random, MUTATIONS.length)](out, random, other);
  return out;
}
