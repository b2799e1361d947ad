import { bareCode } from '../station-codes.ts';
import type { RegistryStation } from '../types.ts';
import type { Positions } from './positions.ts';
import type { RegistryTable } from './registry-table.ts';

/** What a person should know of a registry that has been taken. */
export function registryWarnings(
  stations: readonly RegistryStation[],
  { columns, header }: RegistryTable,
  { corrected }: Pick<Positions, 'corrected'>,
): string[] {
  const warnings: string[] = [];
  const count = (test: (station: RegistryStation) => boolean) => stations.filter(test).length;
  const say = (number: number, words: string) => {
    if (number > 0) warnings.push(`${number} stations ${words}`);
  };
  say(corrected['swap-coordinates'] ?? 0, 'had latitude and longitude swapped back, as asked.');
  say(corrected['longitude-360'] ?? 0, 'had their longitude counted from −180 to 180, as asked.');
  if (columns.latitude >= 0)
    say(
      count(({ latitude }) => latitude === null),
      'have no position; they are not on the map.',
    );
  if (columns.areaKm2 >= 0)
    say(
      count(({ areaKm2 }) => areaKm2 === null),
      'have no drainage area; they are left out where flows are compared by area.',
    );
  const atZero = count(({ latitude, longitude }) => latitude === 0 && longitude === 0);
  if (atZero > 0) warnings.push(`${atZero} stations lie at latitude 0, longitude 0: are their positions missing?`);
  if (columns.otherAreas.length > 0) {
    const others = columns.otherAreas.map((at) => `“${header[at]}”`).join(', ');
    warnings.push(`The area was taken from “${header[columns.areaKm2]}”, not from ${others}.`);
  }
  const alike = codesAlike(stations);
  if (alike.length > 0)
    warnings.push(`Codes that differ only by case or leading zeros: ${alike.slice(0, 5).join('; ')}.`);
  return warnings;
}

function codesAlike(stations: readonly RegistryStation[]): string[] {
  const groups = new Map<string, string[]>();
  for (const { code } of stations) groups.set(bareCode(code), [...(groups.get(bareCode(code)) ?? []), code]);
  return [...groups.values()]
    .filter((codes) => codes.length > 1)
    .map((codes) => codes.map((code) => `“${code}”`).join(' and '));
}
