import { minMaxColumns } from '../series/min-max-columns.ts';
import { type Quantity, toShownUnit, UNITS_OF, type Unit } from '../series/quantities.ts';
import { usableFlow } from '../series/usable-flow.ts';
import { readSeries } from '../store/records.ts';
import { stationQuantities } from '../store/station-quantities.ts';

/** Lowest and highest value of each stretch of days; null where there is none. */
export interface Columns {
  low: (number | null)[];
  high: (number | null)[];
}

/** A daily record beside a station's flow, small enough for a page. */
export interface BesideFlow {
  quantity: Quantity;
  /** in which it is shown */
  unit: Unit;
  /** first and last day with a value: day numbers */
  firstDay: number;
  lastDay: number;
  valueCount: number;
  lowest: number;
  highest: number;
  columns: Columns;
  /** the flow of the same days, m³/s; null when the station has none */
  flow: Columns | null;
}

/** Columns of a figure: about two a pixel on a phone, one on a wide screen. */
const COLUMNS = 900;

/** A station's records beside its flow, rejected days left out. Reads them whole: a few milliseconds each. */
export function besideFlow({ id, areaKm2 }: { id: number; areaKm2: number | null }): BesideFlow[] {
  return stationQuantities(id).flatMap(({ quantity, unit, firstValueDay, lastValueDay, valueCount }): BesideFlow[] => {
    if (quantity === 'flow' || firstValueDay === null || lastValueDay === null) return [];
    const span = { first: firstValueDay, last: lastValueDay };
    const factor = toShownUnit(quantity, unit, areaKm2);
    const values = daysOf(id, quantity, span)?.map((value) => value * factor);
    if (!values) return [];
    const flow = daysOf(id, 'flow', span);
    const given = values.filter((value) => !Number.isNaN(value));
    if (given.length === 0) return [];
    return [
      {
        ...{ quantity, unit: UNITS_OF[quantity][0], firstDay: firstValueDay, lastDay: lastValueDay, valueCount },
        lowest: given.reduce((a, b) => Math.min(a, b)),
        highest: given.reduce((a, b) => Math.max(a, b)),
        columns: columnsOf(values),
        flow: flow && columnsOf(flow),
      },
    ];
  });
}

/** The days first to last of a record, NaN where it has none; null without a record. Flows come in m³/s. */
function daysOf(
  stationId: number,
  quantity: Quantity,
  { first, last }: { first: number; last: number },
): Float64Array | null {
  let days: Float64Array | null = null;
  readSeries(
    [stationId],
    (_, series) => {
      const values = usableFlow(series, []);
      days = new Float64Array(last + 1 - first).map((_, i) => values[first + i - series.firstDay] ?? Number.NaN);
    },
    { quantity },
  );
  return days;
}

/** Five digits: more than a figure can show. */
function columnsOf(values: Float64Array): Columns {
  const { low, high } = minMaxColumns(values, COLUMNS);
  const shown = (value: number) => (Number.isNaN(value) ? null : Number(value.toPrecision(5)));
  return { low: Array.from(low, shown), high: Array.from(high, shown) };
}
