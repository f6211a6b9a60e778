/** Methods on estimates and on the portfolio. */
import { exact, measured, unknown, type MethodGroup } from "./method";

export const estimates: MethodGroup = {
  id: "estimates",
  title: "Volumes and their ranges",
  note: "P90 is the low case: a 90 % chance of at least this much.",
  methods: [
    {
      name: "Gas and condensate in place",
      gives: "Wet gas, dry gas and condensate of a reservoir.",
      source: "43,560 A h φ (1 − Sw) / Bg; split by the wellstream",
      range:
        "Porosity to 0.47. The yield varies trial by trial, and gravity and gas share with it.",
      error: exact("Exact; the whole chain agrees with a separate implementation."),
      usedIn: "Every estimate, calculation “in-place”",
    },
    {
      name: "Sampling",
      gives: "Trials that fill the range of every input.",
      source:
        "Sobol points with the direction numbers of S. Joe, F. Y. Kuo, SIAM J. Sci. Comput. 30 (2008) 2635–2654, scrambled after J. Matoušek, J. Complexity 14 (1998) 527–556; Latin hypercube: M. D. McKay, R. J. Beckman, W. J. Conover, Technometrics 21 (1979) 239–245",
      range:
        "16,384 Sobol points unless asked otherwise, powers of two only; a Latin hypercube takes any number. Same inputs, seed, method and engine give the same bytes.",
      error: measured(
        "Points equal to SciPy's in 48 dimensions. On a typical reservoir 16,384 points know P90 and P10 to 0.3 to 0.5 %, a Latin hypercube to 0.5 to 0.7 %.",
      ),
      usedIn: "Every estimate",
    },
    {
      name: "Standard errors",
      gives: "How far sampling alone may have moved each percentile and the mean.",
      source:
        "Sectioning over 16 independent replicates: M. K. Nakayama, ACM Trans. Model. Comput. Simul. 24 (2014) 19",
      range:
        "From 320 trials; shorter runs have fewer replicates, 5 of them at 100 trials, and take Student's t for it.",
      error: measured(
        "Over 200 seeds one error holds the closed form of a product of lognormals in 67 % of runs and 1.96 errors in 93 %, as Student's t with 15 degrees of freedom says. Intervals of 95 % by Student's t hold percentiles in 93 to 97 % of runs. The mean's error is stated a little small: 1.1 to 1.4 times that for Sobol points and for strongly correlated inputs, whose intervals of 95 % hold in 90 to 95 %.",
      ),
      usedIn: "Every estimate, running until settled",
    },
    {
      name: "Mode",
      gives: "Where a result's trials are densest.",
      source:
        "Kernel density of the logarithms, bandwidth of J. E. Chacón, T. Duong, M. P. Wand, Stat. Sinica 21 (2011) 807–840, spread kept after M. C. Jones, Comput. Stat. Data Anal. 11 (1991) 3–15",
      range: "Of two peaks closer than three bandwidths one is seen.",
      error: measured("Closed form of lognormals to 1 %; sampling moves it by 2 to 4 %."),
      usedIn: "Every estimate",
    },
    {
      name: "Rank correlation",
      gives: "Inputs that move together.",
      source:
        "Normal scores with 2 sin(π r / 6), K. Pearson (1907); of a Latin hypercube, chance correlations taken out first after R. L. Iman, W. J. Conover, Commun. Stat. Simul. Comput. 11 (1982) 311–334",
      range: "A set of correlations that cannot be is refused.",
      error: measured(
        "A published worked example by S. J. Mildenhall (2006) to its last digit; Spearman correlations of what was asked, to sampling error; the closed form of a product of correlated lognormals without bias, its mean to 0.15 % over 400 seeds.",
      ),
      usedIn: "Every estimate with correlations",
    },
    {
      name: "Distributions and percentiles",
      gives: "Curves of the inputs; P90, P50, P10 and mean of the results.",
      source:
        "Lognormal, normal, triangular, PERT, uniform, constant; quantiles R-7 of R. J. Hyndman, Y. Fan, Am. Stat. 50 (1996) 361–365",
      range: "Cut-offs are shown with the probability they remove.",
      error: exact("Exact; checked against published values and SciPy."),
      usedIn: "Every estimate, calculation “distribution”",
    },
    {
      name: "Limits behind a P90 and a P10",
      gives: "The ends of a triangular or PERT range whose low and high are percentiles.",
      source:
        "The definition of the percentile, solved for the place of the mode by Brent's method",
      range:
        "P90 and P10, or P95 and P05. The most likely value may lie a little outside them; further out it is refused.",
      error: measured("Limits by SciPy's root finder to 8 digits."),
      usedIn: "Every estimate, calculation “distribution”",
    },
    {
      name: "Ranges from stated percentiles",
      gives: "A distribution through two or three percentiles, with the residual at each.",
      source:
        "Closed form for two; least squares against normal quantiles for a normal or lognormal through three; three-parameter lognormal: N. L. Johnson, S. Kotz, N. Balakrishnan, Continuous Univariate Distributions 1 (1994), ch. 14",
      range:
        "Any exceedances in order. A residual above 5 % of the stated spread is asked about at submission.",
      error: measured("SciPy's solutions to 9 digits, both skews."),
      usedIn: "Every estimate, calculation “distribution”",
    },
    {
      name: "Ranges from measured values",
      gives: "The values themselves, or the likeliest normal or lognormal distribution.",
      source:
        "Order statistics of type 7: R. J. Hyndman, Y. Fan, Am. Stat. 50 (1996) 361–365; maximum likelihood",
      range:
        "5 to 2,000 values. Fewer than ten, and single plugs where an average is meant, are asked about.",
      error: measured("NumPy and SciPy to 9 digits."),
      usedIn: "Every estimate, calculation “distribution”",
    },
    {
      name: "Goodness of fit",
      gives: "Two chances of values as unlike the fitted shape as those measured.",
      source:
        "Anderson–Darling: M. A. Stephens, in Goodness-of-Fit Techniques (1986), table 4.9; Lilliefors: G. E. Dallal, L. Wilkinson, Am. Stat. 40 (1986) 294–296",
      range:
        "Mean and standard deviation estimated from the same values. From 8 and from 5 values. Below 0.05 a fit counts as contradicted.",
      error: measured(
        "R's nortest 1.0-4 to 8 digits. Against 100,000 simulated samples of each size from 5 to 50: within 0.01 for chances up to 0.1, which the judgement rests on; above, within 0.035 (Lilliefors) and 0.06 (Anderson–Darling), worst for the fewest values.",
      ),
      usedIn: "Inputs from data, calculation “distribution”",
    },
    {
      name: "Cases with chances",
      gives:
        "A range made of several things that may be true; inputs that share a set take the same case.",
      source: "Mixture of distributions",
      range:
        "2 to 12 cases; weights add up to 1. A constant keeps its whole chance on one value. Inputs of a shared set take no rank correlations.",
      error: measured("SciPy's mixtures to 9 digits; closed forms of uniform cases."),
      usedIn: "Every estimate, calculation “distribution”",
    },
    {
      name: "Nearest rank correlations",
      gives:
        "The possible set nearest to one that contradicts itself; a proposal, never applied unasked.",
      source: "N. J. Higham, IMA J. Numer. Anal. 22 (2002) 329–343, with Dykstra's correction",
      range:
        "Nearest in the correlations of normal scores, over all pairs alike; least eigenvalue 0.002, so that it can be sampled.",
      error: measured("Higham's 3 × 3 and 4 × 4 examples to his 4 digits, SciPy's minimum to 6."),
      usedIn: "Correlation grid, calculation “correlations”",
    },
    {
      name: "Swanson’s mean",
      gives: "A mean from three percentiles, beside the mean of every trial.",
      source: "Hurst, Brown and Swanson (2000): 0.3 P90 + 0.4 P50 + 0.3 P10",
      range: "Ranges that are not too skewed.",
      error: measured(
        "Exact for a normal; against the closed form of a lognormal within 1 % up to P10/P90 of 4.7, 19 % low at 47.",
      ),
      usedIn: "Results, beside the true mean",
    },
    {
      name: "What drives the range",
      gives: "Inputs by their share of the spread.",
      source: "A. Saltelli et al., Global Sensitivity Analysis: the Primer (2008), section 1.2",
      range: "Squared rank correlations. Shares of correlated inputs overlap.",
      error: exact("A description of the sample."),
      usedIn: "Results",
    },
    {
      name: "Rank regression",
      gives: "The own effect of each input, the others held.",
      source: "R. L. Iman, W. J. Conover, Technometrics 21 (1979) 499–509",
      range:
        "Results that rise or fall with each input; R² of ranks says how far that is so. An input that follows from others is left out and named.",
      error: measured("NumPy's least squares on SciPy's ranks to 12 digits."),
      usedIn: "Results, calculation “sensitivity”",
    },
    {
      name: "Variance-based shares",
      gives: "What of the variance goes when a factor is known, and what stays without it.",
      source:
        "First order: A. Saltelli et al., Comput. Phys. Commun. 181 (2010) 259–270; total: M. J. W. Jansen, Comput. Phys. Commun. 117 (1999) 35–43",
      range:
        "Independent factors: correlated inputs, and the inputs of a set of cases, are one together. 8,192 base trials in 16 replicates.",
      error: measured(
        "The closed forms of Ishigami's function, Sobol's g-function and a product of lognormals, each within 4 of the standard errors shown.",
      ),
      usedIn: "Results, calculation “sensitivity”",
    },
    {
      name: "Value of knowing an input",
      gives: "Expected share of the variance that goes, and expected P90–P10 width that stays.",
      source:
        "Correlation ratio by bins of equal probability, a straight line within each: K. Pearson (1905); A. Saltelli et al., Global Sensitivity Analysis: the Primer (2008), section 1.2.4",
      range: "Correlated inputs too: what moves with the input is learned with it.",
      error: measured(
        "Closed form of a joint normal at correlations of 0 to 0.9: within 0.02 at 10,000 trials.",
      ),
      usedIn: "Results, calculation “sensitivity”",
    },
    {
      name: "What chosen trials share",
      gives: "Ranges and mean rank of the inputs where the result lies between two chances.",
      source: "Conditional sample of the trials; common practice, no source",
      range: "At least 1 % of the trials.",
      error: measured("Mean and mean rank of a bivariate normal above its P10, by SciPy, to 0.01."),
      usedIn: "Results, calculation “sensitivity”",
    },
    {
      name: "What explains a change",
      gives: "How much each difference explains of the move of a percentile.",
      source:
        "Average over the orders of making the changes: L. S. Shapley (1953); drawn orders: J. Castro, D. Gómez, J. Tejada, Comput. Oper. Res. 36 (2009) 1726–1730",
      range:
        "All orders for six differences or fewer, else 64 drawn ones with a standard error. The same random numbers throughout; differences that make no estimate without each other count as one.",
      error: measured(
        "Closed form of a product of lognormals to 1 %; effects add up to the move, to rounding.",
      ),
      usedIn: "Comparison, calculation “change”",
    },
  ],
};

export const portfolio: MethodGroup = {
  id: "portfolio",
  title: "Portfolio and value",
  note: "Percentiles do not add: an arithmetic sum is shown only under that name.",
  methods: [
    {
      name: "Totals",
      gives: "Range of a sum of fields, trial by trial.",
      source:
        "Normal copula with common factors: A. J. McNeil, R. Frey, P. Embrechts, Quantitative Risk Management, 2nd ed. (2015), sections 6.4 and 7.3",
      range:
        "By a named dependence set. Estimates with another number of trials join by their ranks. A portfolio's P90 is no reserves category.",
      error: measured(
        "Ten lognormal fields to 1 % of the closed form and of the approximation of Fenton and Wilkinson; standard errors stand with the total, on the safe side.",
      ),
      usedIn: "Portfolio, fields, exports",
    },
    {
      name: "Dependence of fields",
      gives: "How reservoirs move together: the portfolio, the basin, and factors that some share.",
      source:
        "Rank correlation r as 2 sin(π r / 6) between normal scores: K. Pearson, Biometric Series IV (1907)",
      range:
        "0 to 0.99; a basin at least the portfolio. What a field shares comes to at most 1, else the set is refused with the names.",
      error: measured("Spearman correlations of what was asked to 0.02 at 20,000 trials."),
      usedIn: "Dependence sets, every total",
    },
    {
      name: "Diversification",
      gives: "What adding trial by trial does to P90, P50 and P10.",
      source:
        "Total less arithmetic sum; direction as in the Guidelines for Application of the PRMS (2011), from memory",
      range: "P90 gains and P10 loses unless all fields move as one.",
      error: exact("A difference of the two totals."),
      usedIn: "Portfolio, fields",
    },
    {
      name: "Contributions to a percentile",
      gives: "What each field holds when the total comes out at its P90, P50 or P10.",
      source:
        "Euler's allocation: D. Tasche, Risk contributions and performance measurement (1999); a line through the 5 % of trials nearest the percentile",
      range:
        "They add up to the percentile. Shares of variance are covariances with the total; they add up to 1.",
      error: measured("Closed form of jointly normal fields within 0.1 of a field's deviation."),
      usedIn: "Portfolio, selections of fields",
    },
    {
      name: "Risk",
      gives: "Figures times the chance of commerciality, or drawn yes or no trial by trial.",
      source: "Expectation; or independent draws with the field's chance (common practice)",
      range:
        "Risked: the mean is exact and the chance of nothing is not in the range. Yes or no: it is, and the mean is that of the draws.",
      error: measured(
        "Mean, variance and chance of nothing of the closed form of the mixture, within sampling error at 20,000 trials.",
      ),
      usedIn: "Portfolio, fields, exports, as the basis says",
    },
    {
      name: "Liquid value",
      gives: "What a field's recoverable condensate would fetch.",
      source: "Volume times the deck's realised price",
      range: "Flat, real, undiscounted, before cost and tax.",
      error: exact("That of the deck and of the volumes."),
      usedIn: "Fields, portfolio, exports",
    },
  ],
};

export const conditions: MethodGroup = {
  id: "conditions",
  title: "Units, conditions and cautions",
  note: "Kept in scf at 14.696 psia and 60 °F and in stock-tank barrels; shown as the basis says.",
  methods: [
    {
      name: "Standard conditions",
      gives: "The same gas at another base.",
      source:
        "ISO 13443; exact factors of the international yard and pound (1959) and the SI (2019)",
      range: "14.65, 14.696, 14.73, 15.025 psia at 60 °F; 101.325 kPa at 15 °C.",
      error: exact("Exact factors."),
      usedIn: "Everywhere",
    },
    {
      name: "Sour and corrosive gas",
      gives: "A caution where people or steel are at risk.",
      source:
        "ISO 15156 / NACE MR0175 (0.05 psia H₂S); NIOSH limits; CO₂ partial pressure: common practice, from memory",
      range: "From the first ppm of H₂S; CO₂ from 7 psi.",
      error: unknown("A flag. It does not replace a site's own procedures."),
      usedIn: "Fluid, estimates, fields",
    },
    {
      name: "High pressure and temperature",
      gives: "A caution about wells and equipment.",
      source: "30 CFR 250.804 (15,000 psia, 350 °F)",
      range: "From 10,000 psia or 300 °F.",
      error: unknown("A flag."),
      usedIn: "Estimates, fields",
    },
  ],
};
