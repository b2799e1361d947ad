import { FEWEST_FOR_REGIONAL } from '../serial-terms.ts';
import type { MethodChapter } from './definition.ts';

export const trendChapter: MethodChapter = {
  title: 'Trend of one station',
  methods: [
    {
      id: 'mann-kendall',
      title: 'Mann–Kendall test',
      says: [
        'Counts, over all pairs of years, how often the later one is higher and how often lower. The p-value is two-sided. With up to ten years, no ties and no serial correction it is exact.',
      ],
      formulas: [
        {
          tex: String.raw`S = \sum_{i<j} \operatorname{sign}(x_j - x_i)`,
          where: 'x the annual figures in the order of years',
        },
        {
          tex: String.raw`\operatorname{Var} S = \frac{1}{18}\Bigl[n(n-1)(2n+5) - \sum_t t(t-1)(2t+5)\Bigr], \qquad Z = \frac{S \mp 1}{\sqrt{f \operatorname{Var} S}}`,
          where: 'n the number of years, t the sizes of groups of equal values, f the factor for serial correlation',
        },
      ],
      assumes: [
        'Years that are independent of each other but for what the serial correction takes account of.',
        'One direction of change over the whole period.',
      ],
      distrust: [
        'A step reads as a trend, and so does half a turn of a slow cycle.',
        'Spells of several decades can look like a trend, and no test here rules that out.',
      ],
      sources: [
        'Mann, H. B. (1945): Nonparametric tests against trend. Econometrica 13, 245–259.',
        'Kendall, M. G. (1975): Rank Correlation Methods, 4th ed. Griffin.',
      ],
      simulated: ['long-memory'],
    },
    {
      id: 'slope',
      title: 'Slope and its interval',
      says: [
        'The slope is the median of the slopes between all pairs of years, with real years, so that gaps are what they are. The interval is for 95 %, whatever significance the basis asks for. Percent per decade is the slope in percent of the mean of the annual figures.',
      ],
      formulas: [
        { tex: String.raw`b = \operatorname*{median}_{i<j} \frac{x_j - x_i}{t_j - t_i}`, where: 't the years' },
        {
          tex: String.raw`\text{ranks}\quad \frac{N' - C}{2} \quad\text{and}\quad \frac{N' + C}{2} + 1, \qquad C = 1.95996\,\sqrt{f \operatorname{Var} S}`,
          where:
            'N′ the number of pairs; limits are interpolated between the slopes in order, and there is none where a rank falls outside',
        },
      ],
      assumes: ['A change that a straight line describes fairly.'],
      distrust: [
        'With many zero minima the slope of a trendless series is often exactly 0: from a tenth of zeros a station is marked, from a third it is listed under Drying and compared by its days without flow.',
        'A mean of under ten recording steps makes a percentage coarse; such stations are marked.',
      ],
      sources: [
        'Theil, H. (1950): A rank-invariant method of linear and polynomial regression analysis. Proc. Kon. Ned. Akad. Wet. A 53.',
        'Sen, P. K. (1968): Estimates of the regression coefficient based on Kendall’s tau. J. Am. Stat. Assoc. 63, 1379–1389.',
        'Gilbert, R. O. (1987): Statistical Methods for Environmental Pollution Monitoring. Van Nostrand Reinhold.',
      ],
      simulated: ['interval-cover', 'slope-exactly-zero'],
    },
    {
      id: 'serial-correlation',
      title: 'Serial correlation',
      says: [
        'A dry year tends to be followed by a dry one, because aquifers and lakes remember. A test that takes years for independent then finds trends that are not there. The corrections in common use do not cure this wholly; the table shows what each of them leaves.',
        `The default inflates the variance for the correlation of successive years, freed of its bias, and draws each station’s correlation towards the region’s mean by what of the spread is not chance. With fewer than ${FEWEST_FOR_REGIONAL} ranked stations each is corrected by itself.`,
        'The others are there to compare with what was done elsewhere: all significant lags (as published by Hamed and Rao), trend-free pre-whitening, and a bootstrap of moving blocks.',
      ],
      formulas: [
        {
          tex: String.raw`f = 1 + \frac{2}{n(n-1)(n-2)} \sum_{k=1}^{n-1} (n-k)(n-k-1)(n-k-2)\, r_1^{\,k}`,
          where: 'r₁ the lag-1 correlation of the ranks of the detrended values, cut to 0–0.95',
        },
        {
          tex: String.raw`r_{1,i} = \bar r + \frac{v}{v + 1/\bar n}\,(r_i - \bar r), \qquad v = \max\bigl(0,\ \operatorname{var}(r_i) - 1/\bar n\bigr)`,
          where: 'for each station i of the region, n̄ the mean number of years',
        },
      ],
      assumes: ['Carry-over that fades from year to year as a first-order autoregression does.'],
      distrust: [
        'Long memory: false alarms rise beyond what is asked for.',
        'Pre-whitening leaves most false alarms standing, and all significant lags can even shrink the variance.',
        'Under pre-whitening only z and p come from the whitened values: slope and interval stay those of the record, and the interval is then too narrow where low flows carry over.',
      ],
      sources: [
        'Hamed, K. H., Rao, A. R. (1998): A modified Mann–Kendall trend test for autocorrelated data. J. Hydrol. 204, 182–196.',
        'Yue, S., Wang, C. Y. (2004): The Mann–Kendall test modified by effective sample size. Water Resour. Manag. 18, 201–218.',
        'Yue, S., et al. (2002): The influence of autocorrelation on the ability to detect trend. Hydrol. Process. 16, 1807–1829.',
        'Salas, J. D., et al. (1980): Applied Modeling of Hydrologic Time Series (bias of r₁).',
        'Efron, B., Morris, C. (1975): Data analysis using Stein’s estimator. J. Am. Stat. Assoc. 70, 311–319.',
        'Künsch, H. R. (1989): The jackknife and the bootstrap for general stationary observations. Ann. Stat. 17, 1217–1241.',
      ],
      simulated: ['false-alarms'],
    },
    {
      id: 'detectable-trend',
      title: 'What this record could have shown',
      says: [
        'The trend that the test would have found in four records of five of this length, spread and carry-over. An honest “no trend found” needs it: a change smaller than this passes unseen more often than one time in five.',
      ],
      formulas: [
        {
          tex: String.raw`\Pr\bigl(\,p(e^{*} + b_{80}\,t) < \alpha\,\bigr) = 0.8`,
          where:
            'e* a replicate of the station’s own residuals by the sieve; the smallest slope at which a replicate is found significant is one of its ordered slopes, and b₈₀ is the 80 % point of these',
        },
      ],
      assumes: [
        'The residuals of this record are what other records of the same river would have shown.',
        'One station by itself at the basis’s significance; after adjusting for many stations a larger trend is needed.',
      ],
      distrust: [
        'A record with a strong trend or step has residuals that are too wide, and the figure is then too large.',
      ],
      sources: ['Definition of this program, from the sieve bootstrap of Bühlmann (1997).'],
      simulated: ['detectable-trend'],
    },
    {
      id: 'change-point',
      title: 'Change point',
      says: [
        'The place where the series is most likely to have changed its level, if it did. It is shown and never tested: a test at a break that the same data suggested finds one most of the time, even in series that have none. Beside a significant trend it reads “step or trend, not told apart”.',
      ],
      formulas: [
        {
          tex: String.raw`U_t = 2\sum_{i \le t} R_i - t(n+1), \qquad K = \max_t |U_t|, \qquad p \approx \min\Bigl(1,\ 2\,e^{-6K^2/(n^3+n^2)}\Bigr)`,
          where: 'R the ranks; with carry-over (r₁ > 0) p comes from the sieve instead',
        },
      ],
      assumes: ['At most one change of level.'],
      distrust: [
        'A straight trend gives a change point most of the time.',
        'A new rating, a weir or a moved gauge makes a step as a dam does: look at the station’s dated changes.',
      ],
      sources: [
        'Pettitt, A. N. (1979): A non-parametric approach to the change-point problem. Appl. Stat. 28, 126–135.',
      ],
      simulated: ['change-point-alarms', 'suggested-break-tested'],
    },
  ],
};
