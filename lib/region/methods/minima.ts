import { END_YEARS } from '../completeness.ts';
import type { MethodChapter } from './definition.ts';

export const minimaChapter: MethodChapter = {
  title: 'What is compared',
  methods: [
    {
      id: 'low-flow-year',
      title: 'Low-flow year and annual minimum',
      says: [
        'A low-flow year has twelve months and is named by the calendar year in which it begins. Unless a month is chosen it begins in the month that is wettest against the year at the median station, so that lows fall inside it.',
        'The annual minimum is the smallest mean of n consecutive days that all have a value and all lie inside the year, or inside its season.',
      ],
      formulas: [
        {
          tex: String.raw`m_y = \min_{t \in y} \frac{1}{n} \sum_{i=0}^{n-1} q_{t-i}`,
          where:
            'q the daily mean flow, n the days of the mean, y the low-flow year; the date is the last day of the first window that attains it',
        },
      ],
      assumes: ['Daily means of one gauge, on one rating, in one unit.'],
      distrust: [
        'Where more than a tenth of the minima lie at the year’s edge, or one low is counted in two years, the station is marked, with the month that would do.',
        'Lows under ice are estimates. Low flows are measured to 10–20 % at best (common practice, no source).',
      ],
      sources: [
        'Riggs, H. C. (1972): Low-flow investigations. USGS Techniques of Water-Resources Investigations 4-B1.',
        'WMO (2008): Manual on Low-flow Estimation and Prediction. WMO-No. 1029.',
      ],
    },
    {
      id: 'usable-year',
      title: 'Usable years, ranked stations, common period',
      says: [
        'A year is usable when few enough days are missing, at most a tenth of its windows are lost to them, and no gap of more than two days has a flow beside it under 1.1 times the year’s minimum: the low may lie inside such a gap. Other years are listed with the reason and not used.',
        `A station is ranked with enough usable years in the period, in its first ${END_YEARS} and in its last ${END_YEARS}, and with less than a third of its minima zero. Every other station is listed with the reason.`,
        'The common period is, of all spans at least as long as the fewest years asked for, the one with the most station-years of ranked stations.',
      ],
      formulas: [],
      assumes: ['Years that are missing are missing for reasons that have nothing to do with the flow.'],
      distrust: ['Periods of one’s own make records unlike: short records crowd both ends of such a ranking.'],
      sources: ['Definitions of this program; their effect was simulated.'],
      simulated: ['steepest-by-length'],
    },
    {
      id: 'annual-indices',
      title: 'Other annual figures',
      says: [
        'In place of the minimum the basis may name the flow exceeded on 95 % of the year’s days, the mean flow, the days without flow, the baseflow index, the date of the minimum, or the deficit volume below the flow that the record exceeds on 90 % of its days. All that follows is then said of that figure.',
        'Where more means drier (days without flow, deficit), the test is of minus the figure, so that “falling” always means drier. Dates are laid within half a year about their mean date, so that December and January are neighbours; falling then means earlier.',
      ],
      formulas: [
        {
          tex: String.raw`\bar\theta = \operatorname{atan2}\Bigl(\sum_i \sin\theta_i,\ \sum_i \cos\theta_i\Bigr), \qquad \theta_i = 2\pi\,\frac{d_i}{D_i}`,
          where:
            'd the day of the calendar year of the minimum, D the days of that year; the length of the mean vector is the concentration, 0 for dates all round the year and 1 for one date',
        },
      ],
      assumes: ['The figure means the same in every year: same season, same gauge, same rating.'],
      distrust: [
        'A trend in dates says little where they are spread all round the year (concentration under 0.5).',
        'A baseflow index depends on how baseflow is defined; compare only within one definition.',
      ],
      sources: [
        'Institute of Hydrology (1980): Low Flow Studies. Wallingford (baseflow index by smoothed minima).',
        'Mardia, K. V., Jupp, P. E. (2000): Directional Statistics. Wiley.',
        'Tallaksen, L. M., van Lanen, H. A. J. (eds., 2004): Hydrological Drought. Elsevier.',
      ],
    },
  ],
};
