import { statisticNamed } from './observed-quantity.ts';
import { sentenceBits } from './qualifier.ts';
import type { SeriesHead } from './series-head.ts';

/** What a time series of WaterML 1 says of itself, in XML and in JSON alike. */
export interface Waterml1Facts {
  siteCode: string;
  siteName: string;
  latitude: number;
  longitude: number;
  variableCode: string;
  variableName: string;
  description: string;
  unit: string;
  statisticCode: string;
  statisticName: string;
  /** kind of value: Average, Maximum, … */
  dataType: string;
  noData: string;
}

export const noFacts = (): Waterml1Facts => ({
  ...{ siteCode: '', siteName: '', latitude: Number.NaN, longitude: Number.NaN, variableCode: '', variableName: '' },
  ...{ description: '', unit: '', statisticCode: '', statisticName: '', dataType: '', noData: '' },
});

/** Statistic number of readings, which are of no time but a moment. */
const INSTANT = '00000';

/** What stands before the points of a series. A statistic of the day (00003: its mean) says that values are daily. */
export function headOf(facts: Waterml1Facts): SeriesHead {
  const { siteCode, statisticCode, latitude, longitude } = facts;
  const siteName = unescaped(facts.siteName);
  const statistic = `${facts.statisticName} ${statisticCode}`.trim() || facts.dataType;
  const placed = Math.abs(latitude) <= 90 && Math.abs(longitude) <= 360;
  return {
    names: [...new Set([siteCode, siteName])].filter((name) => name !== ''),
    facts: { ...(siteName === '' ? {} : { name: siteName }), ...(placed ? { latitude, longitude } : {}) },
    property: unescaped(facts.description || facts.variableName),
    propertyCode: facts.variableCode,
    ...{ statistic: statisticNamed(statistic), statisticText: facts.statisticName || statistic },
    unitText: unescaped(facts.unit) || unitInName(unescaped(facts.variableName)),
    meaning: 'instant',
    stepDays: /^\d{5}$/.test(statisticCode) && statisticCode !== INSTANT ? 1 : null,
    noData: facts.noData.trim() === '' ? [] : [Number(facts.noData)],
  };
}

/** FLAG bits of qualifiers by their codes, from the codes and their explanations. */
export function qualifierBits(qualifiers: readonly { code: string; description: string }[]): Map<string, number> {
  return new Map(qualifiers.map(({ code, description }) => [code, sentenceBits(unescaped(description))]));
}

/** “Streamflow, ft³/s” → “ft³/s”. */
function unitInName(name: string): string {
  return name.slice(name.lastIndexOf(',') + 1).trim();
}

const NAMED: Record<string, string> = {
  amp: '&',
  lt: '<',
  gt: '>',
  quot: '"',
  apos: "'",
  deg: '°',
  sup2: '²',
  sup3: '³',
};

/** Text that was escaped for web pages before it was put into the document: “ft&#179;/s” → “ft³/s”. */
function unescaped(text: string): string {
  return text.replace(/&(?:#(\d{1,6})|#x([0-9a-f]{1,5})|([a-z]{2,5}\d?));/gi, (whole, decimal, hex, name) => {
    if (name !== undefined) return NAMED[name] ?? whole;
    const code = decimal === undefined ? Number.parseInt(hex, 16) : Number(decimal);
    return code > 0 && code <= 0x10ffff ? String.fromCodePoint(code) : whole;
  });
}
