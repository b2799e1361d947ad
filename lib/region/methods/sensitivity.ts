import { FEWEST_WINDOW_YEARS } from '../window-types.ts';
import type { MethodChapter } from './definition.ts';

export const sensitivityChapter: MethodChapter = {
  title: 'Does it depend on what was chosen?',
  methods: [
    {
      id: 'start-end-chart',
      title: 'Start–end chart and steadiness',
      says: [
        `The trend for every start and end year inside the period with at least ${FEWEST_WINDOW_YEARS} usable years between. Steadiness is the share of these windows that have the sign of the whole period.`,
        'The serial correction is that of the whole period: short windows tell their own carry-over too poorly.',
      ],
      formulas: [
        {
          tex: String.raw`\text{steadiness} = \frac{\#\{(a,b): \operatorname{sign} S_{a..b} = \operatorname{sign} S\}}{\#\{(a,b)\}}`,
          where: 'S of the years a to b',
        },
      ],
      assumes: [],
      distrust: [
        'The windows overlap: they are no independent evidence, and a steadiness of 100 % is no significance.',
      ],
      sources: ['Definition of this program.'],
    },
    {
      id: 'before-after',
      title: 'Before and after a known break',
      says: [
        'For breaks that were known or chosen before looking: the difference of levels is the median of all differences between a later and an earlier year, with its interval, and a rank-sum test whose variance is widened for carry-over.',
      ],
      formulas: [
        {
          tex: String.raw`\Delta = \operatorname*{median}_{i,j}\,(y_j - x_i)`,
          where: 'x the years before, y the years after',
        },
        {
          tex: String.raw`\operatorname{Var} W = f\,\frac{n m (N+1)}{12}\Bigl(1 - \frac{\sum (t^3 - t)}{N^3 - N}\Bigr)`,
          where: 'n and m the years on either side, N = n + m, t the sizes of groups of equal values',
        },
      ],
      assumes: ['A break that these data did not suggest.', 'Levels that are steady on either side.'],
      distrust: [
        'Weather differs on both sides of any break. Compare with a station that the break did not touch.',
        'Under ten years a side: shown with a warning.',
      ],
      sources: [
        'Hodges, J. L., Lehmann, E. L. (1963): Estimates of location based on rank tests. Ann. Math. Stat. 34, 598–611.',
        'Mann, H. B., Whitney, D. R. (1947): On a test of whether one of two random variables is stochastically larger than the other. Ann. Math. Stat. 18, 50–60.',
      ],
      simulated: ['suggested-break-tested'],
    },
    {
      id: 'against-a-reference',
      title: 'Against a reference',
      says: [
        'A station against one that nobody touches, or the mean of several: the trend in their ratio, and the double-mass curve of their sums. Weather that both share cancels, and what is left is what differs: management, a gauge, or the ground.',
      ],
      formulas: [
        {
          tex: String.raw`\rho_y = \frac{x_y / \bar x}{\tfrac1k \sum_{j=1}^{k} r_{j,y} / \bar r_j}`,
          where: 'x the station, r the k references, each over its own mean in the common years',
        },
      ],
      assumes: ['References that the change did not touch, and that answer to weather as the station does.'],
      distrust: ['Weakly correlated references: the ratio then shows their weather too.'],
      sources: ['Searcy, J. K., Hardison, C. H. (1960): Double-mass curves. USGS Water-Supply Paper 1541-B.'],
    },
    {
      id: 'given-weather',
      title: 'Given the weather before',
      says: [
        'Where rainfall or evaporation is stored: the minima are smoothed over the sum of the days before them, and the trend is taken of what is left.',
      ],
      formulas: [
        {
          tex: String.raw`e_y = m_y - \operatorname{lowess}(P_y), \qquad P_y = \sum_{i=0}^{D-1} p_{t_y - i}`,
          where: 'm the minimum on day t, p the daily rainfall or evaporation, D the number of days that end with it',
        },
      ],
      assumes: ['The same weather gives the same minimum in every year but for the trend.'],
      distrust: [
        'Rain at one gauge is not that of the catchment.',
        'Where the weather itself has a trend, what is taken out is part of the answer to another question.',
      ],
      sources: [
        'Helsel, D. R., et al. (2020): Statistical Methods in Water Resources. USGS Techniques and Methods 4-A3, chapter 12.',
        'Cleveland, W. S. (1979): Robust locally weighted regression and smoothing scatterplots. J. Am. Stat. Assoc. 74, 829–836.',
      ],
    },
  ],
};
