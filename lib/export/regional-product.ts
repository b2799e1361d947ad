import type { BeyondChance, GroupAnswer, RegionalAnswers } from '../region/regional-types.ts';
import { type Column, csvTable } from './csv.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';
import { tableMetadata } from './table-metadata.ts';

/** A group with what holds for all of them. */
type GroupRow = GroupAnswer & Pick<RegionalAnswers, 'method' | 'replicates' | 'trueLevel'>;

/** The four figures of one direction. */
function beside(side: 'falling' | 'rising', verb: string): Column<GroupRow>[] {
  const figure = (name: string, description: string, key: keyof BeyondChance): Column<GroupRow> => ({
    name: `${side}_${name}`,
    datatype: key === 'count' || key === 'bound' ? 'integer' : 'number',
    description,
    value: (row) => row[side]?.[key] ?? null,
  });
  return [
    figure('count', `ranked stations that ${verb}: unadjusted p below alpha`, 'count'),
    figure(
      'bound',
      `up to so many would in 95 of 100 regions without any trend that share weather as these do`,
      'bound',
    ),
    figure('expected', 'mean number that would by chance', 'expected'),
    figure('p', 'share of replicates without trend in which at least as many do', 'p'),
  ];
}

const COLUMNS: readonly Column<GroupRow>[] = [
  {
    name: 'group',
    datatype: 'string',
    description: 'all, influence:natural and so on, or drawn',
    value: (row) => row.id,
  },
  { name: 'label', datatype: 'string', description: 'the group in words', value: (row) => row.label },
  {
    name: 'set',
    datatype: 'string',
    description: 'all stations of the group, or the independent set: of two that share water only the longer record',
    value: (row) => row.set,
  },
  { name: 'ranked', datatype: 'integer', description: 'ranked stations of the group', value: (row) => row.ranked },
  ...beside('falling', 'fall'),
  ...beside('rising', 'rise'),
  {
    name: 'chance_method',
    datatype: 'string',
    description: 'how chance is imitated: permutation of the years, or sieve',
    value: (row) => row.method,
  },
  {
    name: 'replicates',
    datatype: 'integer',
    description: 'how often chance was tried',
    value: (row) => row.replicates,
  },
  {
    name: 'true_level_low',
    datatype: 'number',
    description:
      'least share of regions without trend whose count is nevertheless above the bound, simulated; 0.05 is meant',
    value: (row) => row.trueLevel?.[0] ?? null,
  },
  {
    name: 'true_level_high',
    datatype: 'number',
    description: 'most of these shares',
    value: (row) => row.trueLevel?.[1] ?? null,
  },
  {
    name: 'discoveries_falling',
    datatype: 'integer',
    description: 'stations falling by adjusted p over the whole region: another question than falling_count',
    value: (row) => row.discoveries.falling,
  },
  {
    name: 'discoveries_rising',
    datatype: 'integer',
    description: 'stations rising by adjusted p over the whole region',
    value: (row) => row.discoveries.rising,
  },
  {
    name: 'sloping_down',
    datatype: 'integer',
    description: 'stations whose tau is below 0',
    value: (row) => row.signs.negative,
  },
  {
    name: 'level',
    datatype: 'integer',
    description: 'stations whose tau is 0 or none',
    value: (row) => row.signs.zero,
  },
  {
    name: 'sloping_up',
    datatype: 'integer',
    description: 'stations whose tau is above 0',
    value: (row) => row.signs.positive,
  },
  {
    name: 'kendall_s',
    datatype: 'integer',
    description: 'S of the regional Kendall test',
    value: (row) => row.kendall?.s ?? null,
  },
  {
    name: 'kendall_z',
    datatype: 'number',
    description: 'its standard normal deviate, with the covariance of the stations and their carry-over',
    value: (row) => row.kendall?.z ?? null,
  },
  { name: 'kendall_p', datatype: 'number', description: 'its two-sided p', value: (row) => row.kendall?.p ?? null },
  {
    name: 'median_figure',
    datatype: 'number',
    description: 'median of the stations’ ranking figures, unit of rankBy',
    value: (row) => row.kendall?.medianFigure ?? null,
  },
  {
    name: 'mean_lag1_correlation',
    datatype: 'number',
    description: 'mean of the stations’ lag-1 correlations, cut to 0–0.95',
    value: (row) => row.kendall?.r1 ?? null,
  },
  {
    name: 'variance_factor',
    datatype: 'number',
    description: 'what the variance of S was multiplied by for it',
    value: (row) => row.kendall?.serialFactor ?? null,
  },
  {
    name: 'sentence_chance',
    datatype: 'string',
    description: 'the count beside chance in words',
    value: (row) => row.sentences.chance,
  },
  {
    name: 'sentence_kendall',
    datatype: 'string',
    description: 'the common trend in words',
    value: (row) => row.sentences.kendall,
  },
  {
    name: 'sentence_discoveries',
    datatype: 'string',
    description: 'the stations by adjusted p in words',
    value: (row) => row.sentences.discoveries,
  },
];

/** What the stations of a region say together: as CSV a row a group and set; as JSON with the stations of each group and
 *  the pairs that share water. */
export function regionalProduct(format: 'csv' | 'json', answers: RegionalAnswers, from: Provenance): string {
  if (format === 'json') return JSON.stringify({ ...provenanceNotes(from), ...answers });
  const { method, replicates, trueLevel } = answers;
  return csvTable(
    COLUMNS,
    answers.groups.map((group) => ({ ...group, method, replicates, trueLevel })),
  );
}

/** What lies beside the CSV file. */
export function regionalMetadata(from: Provenance, fileName: string): Record<string, unknown> {
  return tableMetadata(fileName, `${from.region.name}: what its stations say together`, COLUMNS, from);
}
