import { readCodes } from '@/app/components/codes-in-address';
import { WEATHER_QUANTITIES, type WeatherQuantity } from '@/lib/region/pair-types';
import { MOST_ANTECEDENT_DAYS } from '@/lib/series/antecedent-sum';

/** What the page shows, as it stands in the address beside the basis. */
export interface PairView {
  /** code; null until one is chosen */
  station: string | null;
  /** codes of the references; null: those that the page begins with */
  references: string[] | null;
  weather: { quantity?: WeatherQuantity; from?: string; antecedentDays?: number };
}

/** Reads the view from the address; what cannot be read is as if it were not there. */
export function readPairView(query: URLSearchParams): PairView {
  const text = (name: string) => query.get(name)?.trim() || null;
  const named = query.get('with');
  const quantity = WEATHER_QUANTITIES.find((known) => known === text('quantity'));
  const from = text('from');
  const days = Number(text('antecedentDays') ?? Number.NaN);
  const readable = Number.isInteger(days) && days >= 1 && days <= MOST_ANTECEDENT_DAYS;
  return {
    station: text('station'),
    references: named === null ? null : [...new Set(readCodes(named))],
    weather: {
      ...(quantity === undefined ? {} : { quantity }),
      ...(from === null ? {} : { from }),
      ...(readable ? { antecedentDays: days } : {}),
    },
  };
}
