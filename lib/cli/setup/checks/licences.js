import { readFileSync, writeFileSync } from 'node:fs';
import { inProject } from '../paths.js';

const FILE = inProject('public', 'third-party-licences.txt');

/** Packages whose entry in the lock names no licence, with what their own files say. */
const FROM_THEIR_FILES = {
  busboy: 'MIT',
  streamsearch: 'MIT',
  'seq-queue': 'MIT',
};

const HEADING = `Third-party licences

The packages that Hungerstone installs to run, each under its own licence; the texts lie in node_modules beside the code.
Two are out of the ordinary: react-leaflet and @react-leaflet/core are under the Hippocratic License 2.1, which ties the
use of the software to respect for human rights. world-atlas is made from Natural Earth, which is in the public domain.
This list is written by \`npm run check -- --write-licences\`.
`;

/** The list as it should stand.
 *  @param lock  package-lock.json, parsed
 *  @returns     one line a package and version, in alphabetical order
 *  @throws Error that names a package without a known licence */
export function licenceList(lock) {
  const lines = new Set();
  for (const [place, entry] of Object.entries(lock.packages)) {
    if (place === '' || entry.dev) continue;
    const name = place.slice(place.lastIndexOf('node_modules/') + 'node_modules/'.length);
    const licence = entry.license ?? FROM_THEIR_FILES[name];
    if (!licence) throw new Error(`${name} ${entry.version} names no licence; look it up and add it to licences.js`);
    lines.add(`${name} ${entry.version}: ${licence}`);
  }
  return `${HEADING}\n${[...lines].sort().join('\n')}\n`;
}

const wanted = () => licenceList(JSON.parse(readFileSync(inProject('package-lock.json'), 'utf8')));

export function writeLicences() {
  writeFileSync(FILE, wanted());
}

/** @returns null, or what is wrong */
export function checkLicences() {
  let present = '';
  try {
    present = readFileSync(FILE, 'utf8');
  } catch {
    return 'public/third-party-licences.txt is missing: npm run check -- --write-licences';
  }
  return present === wanted()
    ? null
    : 'public/third-party-licences.txt is out of date: npm run check -- --write-licences';
}
