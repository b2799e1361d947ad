import { DAILY_DISCHARGE, unitsNamedIn } from '../units.ts';

/** What a column holds, by its heading. */
export type HeadingRole =
  | 'date'
  | 'year'
  | 'month'
  | 'day'
  | 'station'
  /** may be a station or a code of another kind */
  | 'maybe-station'
  | 'value'
  /** says a flow unit and something else, which may be a station: "Mill (m3/s)" */
  | 'measured'
  | 'flag'
  | 'unit'
  | 'quantity'
  /** names and places: never read */
  | 'ignored'
  /** another measured quantity: rain, stage, … */
  | 'other-quantity'
  | 'unknown';

const words = (text: string): Set<string> => new Set(text.split(' '));

const EXACT: [HeadingRole, Set<string>][] = [
  ['year', words('year yr yyyy y jahr annee année año ano anno år jaar')],
  ['month', words('month mon mo mm mth monat mois mes mês mese månad maand')],
  ['day', words('day dd dy d tag jour dia día giorno dag')],
  ['flag', words('cd sym symbol symbole qf qc e')],
  ['ignored', words('x')],
];

/** A heading's role is that of the first list that holds one of its words, in this order. */
const BY_WORD: [HeadingRole, Set<string>][] = [
  [
    'flag',
    words(
      'flag flags qualifier qualifiers quality qcode qualcode symbol sym status remark remarks grade approval kvalitet',
    ),
  ],
  ['unit', words('unit units einheit unité unidad unidade enhet eenheid')],
  ['quantity', words('param parameter variable')],
  ['ignored', words('agency name nm river stream watercourse lat latitude lon long longitude tz timezone')],
  ['date', words('date datetime datum timestamp fecha dato data dates time')],
  [
    'value',
    words('flow flows discharge streamflow q qdaily qmean qobs value values runoff abfluss debit débit caudal portata'),
  ],
  [
    'value',
    words('afvoer vattenföring vannføring virtaama průtok przepływ vazão wert valeur valor meanflow dailyflow'),
  ],
  [
    'other-quantity',
    words('rain rainfall precip precipitation prcp ppt snow swe temp temperature tmin tmax tmean tavg'),
  ],
  ['other-quantity', words('stage level height gageheight evap evaporation pet pe eto humidity wind srad dayl vp')],
  ['station', words('station site gauge gage stn stationid siteid gaugeid messstelle pegel estacion')],
  ['maybe-station', words('id code no number nr num')],
];

/** A heading that shows how its dates are written: "YYYY-MM-DD", "TT.MM.JJJJ". */
const DATE_FORM = /^(?:[YJA]{4}[-./]MM[-./][DTJ]{2}|[DTJ]{2}[-./]MM[-./][YJA]{4})(?:[ T]HH:MM(?::SS)?)?$/i;

const UNIT_WORDS = words('cfs cms cumecs cumec cusecs m3 s m3s ft3 ft3s l ls lps ml mld d day mm mmd sec 1 3 m ft');

/** Words of a heading: "siteNo" → site, no; "flow_cfs" → flow, cfs. */
function headingWords(heading: string): string[] {
  return heading
    .replace(/(\p{Ll})(\p{Lu})/gu, '$1 $2')
    .toLowerCase()
    .split(/[^\p{L}\p{N}]+/u)
    .filter((word) => word !== '');
}

/** What a column holds, judged by its heading alone. A heading that is nothing but a flow unit is a flow. */
export function roleOfHeading(heading: string): HeadingRole {
  if (DAILY_DISCHARGE.test(heading)) return 'value';
  const found = headingWords(heading);
  const whole = found.join(' ');
  for (const [role, list] of EXACT) if (list.has(whole)) return role;
  if (DATE_FORM.test(heading.trim())) return 'date';
  if (found.length > 1 && found[found.length - 1] === 'cd') return found[0] === 'agency' ? 'ignored' : 'flag';
  for (const [role, list] of BY_WORD) if (found.some((word) => list.has(word))) return role;
  if (unitsNamedIn(heading).length === 0) return 'unknown';
  return found.every((word) => UNIT_WORDS.has(word)) ? 'value' : 'measured';
}
