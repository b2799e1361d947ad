import type { MethodChapter } from './definition.ts';

export const regionChapter: MethodChapter = {
  title: 'Many stations together',
  methods: [
    {
      id: 'false-discoveries',
      title: 'False discoveries',
      says: [
        'With many stations some fall by chance. A station is called falling or rising by its adjusted p-value, so that among all stations so called the expected share of false ones is at most the percentage in the basis. All ranked stations of the region count, never only those in view.',
      ],
      formulas: [
        {
          tex: String.raw`\tilde p_{(i)} = \min_{j \ge i} \min\Bigl(1,\ \frac{M}{j}\,p_{(j)}\Bigr)`,
          where: 'p in rising order, M the ranked stations',
        },
      ],
      assumes: ['p-values that are right one by one, and independent or positively dependent on each other.'],
      distrust: [
        'The share is an expectation over many regions; in one region that shares weather it can be all or none.',
      ],
      sources: [
        'Benjamini, Y., Hochberg, Y. (1995): Controlling the false discovery rate. J. R. Stat. Soc. B 57, 289–300.',
        'Benjamini, Y., Yekutieli, D. (2001): The control of the false discovery rate under dependency. Ann. Stat. 29, 1165–1188.',
      ],
      simulated: ['false-discoveries'],
    },
    {
      id: 'rank-span',
      title: 'Rank span, and who is among the steepest',
      says: [
        'A rank is a guess of a place. The span is the interval that holds the true place in nine cases of ten on average over the stations, not for each station by itself.',
        'Years are drawn anew, the same for all stations, so that neighbours keep sharing their weather; carry-over from year to year is kept. What of the spread among stations is chance is taken out before places are counted. Where nothing is left, every span is the whole list, and the screen says that these stations cannot be told apart.',
      ],
      formulas: [
        {
          tex: String.raw`u_t = e_t - r\,e_{t-1}, \qquad e^{*}_t = r\,e^{*}_{t-1} + u_{Y(t)}`,
          where:
            'e the residuals about the slope line, r the median of the stations’ lag-1 correlations, Y(t) years drawn with replacement, the same for all stations',
        },
        {
          tex: String.raw`\theta^{*}_i = F_i^{-1}\bigl(\operatorname{share}(d_i)\bigr), \qquad F_i(\theta) \propto \int^{\theta} g(x)\,e^{-(b_i - x)^2 / 2 s_i^2}\,dx`,
          where:
            'b the ranking figures, d their deviations in a replicate less what the region shares in it (their mean, steadier stations counting more), share(d) where d stands among the station’s own, s² the variance of d; g the distribution of true figures, normal to begin with (its spread by Paule and Mandel) and roughened towards what the stations say; places are those of θ*',
        },
      ],
      assumes: [
        'Errors of like kind at all stations. Of how the true figures spread nothing is assumed but what the stations show.',
        'Carry-over that fades as a first-order autoregression does, alike over the region.',
      ],
      distrust: [
        'A few steep stations among many level ones are drawn towards the mean: their spans then hold the true place somewhat less often.',
      ],
      sources: [
        'Bühlmann, P. (1997): Sieve bootstrap for time series. Bernoulli 3, 123–148.',
        'Paule, R. C., Mandel, J. (1982): Consensus values and weighting factors. J. Res. Natl. Bur. Stand. 87, 377–385.',
        'Efron, B., Morris, C. (1975): Data analysis using Stein’s estimator. J. Am. Stat. Assoc. 70, 311–319.',
        'Laird, N. M., Louis, T. A. (1991): Smoothing the non-parametric estimate of a prior distribution by roughening. Comput. Stat. Data Anal. 12, 27–37.',
        'Shen, W., Louis, T. A. (1999): Empirical Bayes estimation via the smoothing by roughening approach. J. Comput. Graph. Stat. 8, 800–823.',
        'Laird, N. M., Louis, T. A. (1989): Empirical Bayes ranking methods. J. Educ. Stat. 14, 29–46.',
        'Goldstein, H., Spiegelhalter, D. J. (1996): League tables and their limitations. J. R. Stat. Soc. A 159, 385–443.',
      ],
      simulated: ['span-cover', 'span-width'],
    },
    {
      id: 'beyond-chance',
      title: 'More than chance',
      says: [
        'How many ranked stations fall by their own p-value, and how many would where no station has a trend. Years are put in random order, the same for all stations, ten thousand times: neighbours keep sharing their weather, and any trend is gone. Carry-over is gone with it, so a reordered series is tested without a factor for it. The sieve keeps carry-over, and tests each replicate with correlations of its own.',
        'This count and that of false discoveries answer two questions and are never mixed. Falling and rising are counted apart, for all stations, by influence, for the independent set, and for any group that is drawn on the map.',
      ],
      formulas: [
        {
          tex: String.raw`p = \frac{1 + \#\{\,\text{replicates with a count} \ge \text{that observed}\,\}}{B + 1}`,
          where: 'B the replicates; the bound is the smallest count c with P(count ≤ c) ≥ 0.95',
        },
      ],
      assumes: [
        'Years that could have come in any other order: the serial correction is what makes the observed count comparable.',
      ],
      distrust: [
        'The true level is above the nominal 5 % where low flows carry over; it is printed. By the sieve, which keeps carry-over, it is nearer.',
        'Without any serial correction it is refused where low flows carry over.',
      ],
      sources: [
        'Livezey, R. E., Chen, W. Y. (1983): Statistical field significance and its determination by Monte Carlo techniques. Mon. Weather Rev. 111, 46–59.',
        'Wilks, D. S. (2006): On “field significance” and the false discovery rate. J. Appl. Meteorol. Climatol. 45, 1181–1189.',
      ],
      simulated: ['field-level'],
    },
    {
      id: 'regional-kendall',
      title: 'One common trend',
      says: [
        'Adds the stations’ Mann–Kendall sums and asks whether together they fall or rise. Stations that share weather are not independent witnesses, and years carry over: both widen the variance, the carry-over by the mean of the stations’ correlations whichever serial correction the basis names. The share of stations of each sign stands beside it, for a trend that is up in one half and down in the other cancels.',
      ],
      formulas: [
        {
          tex: String.raw`\operatorname{Var} S_R = f(\bar r)\Bigl(\sum_g \operatorname{Var} S_g + 2\sum_{g<h} \operatorname{cov}(S_g, S_h)\Bigr), \qquad \operatorname{cov}(S_g, S_h) = \tfrac13\Bigl[K_{gh} + 4\sum_i R_{ig}R_{ih} - n(n_g+1)(n_h+1)\Bigr]`,
          where:
            'R midranks, a missing year having the middle one; K the sum of the products of the signs of both stations’ changes',
        },
      ],
      assumes: ['One trend that all stations share.'],
      distrust: ['Mixed signs: look at the shares, and at groups that are alike.'],
      sources: [
        'Helsel, D. R., Frans, L. M. (2006): Regional Kendall test for trend. Environ. Sci. Technol. 40, 4066–4073.',
        'Hirsch, R. M., Slack, J. R. (1984): A nonparametric trend test for seasonal data with serial dependence. Water Resour. Res. 20, 727–732.',
        'Dietz, E. J., Killeen, T. J. (1981): A nonparametric multivariate test for monotone trend. J. Am. Stat. Assoc. 76, 169–174.',
      ],
      simulated: ['regional-kendall'],
    },
    {
      id: 'independent-set',
      title: 'The independent set',
      says: [
        'Nested and twin stations share water and are no two witnesses. Of two stations on one river with an area ratio above 0.5, or with deseasonalised log flows correlated above 0.95, the one with the longer record is kept. Regional statements are given for this set beside all stations, and the pairs are listed.',
      ],
      formulas: [],
      assumes: ['River names and drainage areas that are right.'],
      distrust: [
        'Stations of one valley share weather even where they share no water: the set is less dependent, not independent.',
      ],
      sources: ['Definition of this program.'],
    },
  ],
};
