/**
 * Every method that the product works with, in words: what a person needs to judge a figure and to defend it. Errors
 * are those of the tests beside the code; a new method gets its entry here.
 */

/** What stands behind an error: a balance, the authors' word, a comparison of ours with data, or nothing yet. */
export const evidenceKinds = ["exact", "stated", "measured", "unknown"] as const;
export type EvidenceKind = (typeof evidenceKinds)[number];

export interface Method {
  readonly name: string;
  /** what it gives, in a sentence */
  readonly gives: string;
  readonly source: string;
  /** where it may be used, and what happens outside */
  readonly range: string;
  readonly error: { readonly kind: EvidenceKind; readonly text: string };
  readonly usedIn: string;
}

export interface MethodGroup {
  readonly id: string;
  readonly title: string;
  readonly note: string;
  readonly methods: readonly Method[];
}

const exact = (text: string) => ({ kind: "exact", text }) as const;
const stated = (text: string) => ({ kind: "stated", text }) as const;
const measured = (text: string) => ({ kind: "measured", text }) as const;
const unknown = (text: string) => ({ kind: "unknown", text }) as const;

const separatorTests: MethodGroup = {
  id: "separator-tests",
  title: "From a separator test to the wellstream",
  note: "What most estimates stand on: rates, gravities and the condensate of one test.",
  methods: [
    {
      name: "Wellstream of a separator test",
      gives: "Gravity of the wellstream, share of it that stays gas, and yield.",
      source:
        "Balance of moles and mass; W. D. McCain, The Properties of Petroleum Fluids, 2nd ed. (1990), ch. 7",
      range:
        "Two or three stages. A yield above 400 STB/MMscf is refused: that is an oil. Constants follow from the sheet's own base pressure.",
      error: exact("Exact for what was measured."),
      usedIn: "Fluid, estimates, calculation “wellstream”",
    },
    {
      name: "Gas that nobody measured",
      gives: "Stock-tank gas, or that of a second separator, from the first separator.",
      source: "D. K. Gold, W. D. McCain, J. W. Jennings, J. Pet. Technol. 41 (July 1989) 747–752",
      range:
        "100–700 psia (three stages to 1,500), 60–120 °F, gas gravity 0.6–0.8, 40–70 °API. Warns outside. Counts as nil, with a warning, where it leaves less than nothing.",
      error: stated(
        "Regression on 234 laboratory studies; very steep in gas gravity. Measure the gas where you can.",
      ),
      usedIn: "Fluid, where a stage has no gas",
    },
    {
      name: "Molecular weight of condensate",
      gives: "Moles of a barrel, when the laboratory did not report them.",
      source: "C. S. Cragoe, US Bureau of Standards Misc. Publ. 97 (1929); constants from memory",
      range: "About 40–70 °API. Warns below 35 and above 75.",
      error: measured(
        "4 to 7 % from the form of Gold, McCain and Jennings between 40 and 55 °API, and so is the gas equivalent of the condensate.",
      ),
      usedIn: "Fluid, where the sheet has none",
    },
    {
      name: "Type of fluid",
      gives: "Dry gas, wet gas, gas condensate (lean to near-critical) or volatile oil.",
      source:
        "W. D. McCain (1990), ch. 5, and J. Pet. Technol. 46 (Sept. 1994) 746–750; lean and rich: common practice, no source",
      range:
        "Gas-oil ratio 3,300 to 50,000 scf/STB, or heptanes plus 4 to 12.5 mol %, is a gas condensate. Where the two disagree the richer counts.",
      error: unknown("A rule of thumb. Only a laboratory study says what a fluid is."),
      usedIn: "Fluid",
    },
  ],
};

const compositions: MethodGroup = {
  id: "compositions",
  title: "From a composition to one stream",
  note: "Nothing is changed silently: the reported total and the factor stand beside every sheet.",
  methods: [
    {
      name: "Normalising a sheet",
      gives: "Mole fractions that add up to one.",
      source: "Arithmetic",
      range:
        "Totals of 95 to 105 %; warns beyond 99 to 101 %. Negative figures, gaps in carbon numbers and impossible heptanes plus are refused with the cell.",
      error: exact("The sheet's own."),
      usedIn: "Fluid, calculations on compositions",
    },
    {
      name: "Recombining separator gas and liquid",
      gives: "The wellstream of two analyses, at the measured ratio.",
      source: "Balance of moles; W. D. McCain (1990), ch. 7",
      range: "Ratio in scf per barrel of separator liquid, liquid density at separator conditions.",
      error: exact("As good as the ratio and the density."),
      usedIn: "Fluid, separator streams",
    },
    {
      name: "Carbon numbers C7 to C36",
      gives: "Molecular weight and specific gravity of a fraction reported in mole per cent alone.",
      source:
        "D. L. Katz, A. Firoozabadi, J. Pet. Technol. 30 (Nov. 1978) 1649–1655, as revised by C. H. Whitson, SPE J. 23 (Aug. 1983) 683–694; from memory",
      range: "C7 to C36.",
      error: unknown("A laboratory's own fractions differ by a few per cent with the crude."),
      usedIn: "Fluid, extended analyses",
    },
    {
      name: "Dew point by Nemeth and Kennedy",
      gives: "Dew-point pressure from composition and temperature.",
      source: "L. K. Nemeth, H. T. Kennedy, SPE J. 7 (June 1967) 99–104",
      range: "40–320 °F, 1,270–10,790 psia, heptanes plus of 106–235 lb/lbmol. Warns outside.",
      error: stated(
        "7.4 % on average over 579 points. Two published fluids: 3,484 psia against 3,443 measured, 6,806 against 6,765.",
      ),
      usedIn: "Fluid, beside a measured or computed dew point",
    },
    {
      name: "Dew point by Elsharkawy",
      gives: "A second opinion on the same.",
      source: "A. M. Elsharkawy, Fluid Phase Equilibria 193 (2002) 147–165",
      range: "Warns outside the range of Nemeth and Kennedy; its own could not be confirmed.",
      error: stated(
        "7.7 % on average over some 340 points (from memory). The same two fluids: 3,773 and 6,552 psia.",
      ),
      usedIn: "Fluid, beside the first",
    },
  ],
};

const gases: MethodGroup = {
  id: "gas-properties",
  title: "Properties of gas",
  note: "Compressibility, volumes, heat and liquids of a gas of one phase.",
  methods: [
    {
      name: "Pseudocriticals from gravity",
      gives: "What the z factor needs of a gas, from its gravity and impurities.",
      source:
        "R. P. Sutton, SPE Reservoir Eval. Eng. 10 (June 2007) 270–284, with its correction for acid gas after E. Wichert, K. Aziz (1972)",
      range: "Hydrocarbon gravity 0.554–2.819; warns outside. Non-hydrocarbons below 80 %.",
      error: measured(
        "z within 0.6 % on average of the laboratory on six condensate gases, within 0.8 % of GERG-2008 on five dry gases at 0 to 60 °C (4.3 % at most, at 0 °C).",
      ),
      usedIn: "Every estimate, calculation “z-factor”",
    },
    {
      name: "Pseudocriticals from composition",
      gives: "The same from all components, as a check of the gravity's z.",
      source:
        "L. D. Piper, W. D. McCain, J. H. Corredor, SPE 26668 (1993), constants from memory; W. B. Kay, Ind. Eng. Chem. 28 (1936) 1014 with Wichert and Aziz, for dry gas and as a second opinion",
      range: "Gas of one phase. Kay's rule below 0.7 mol % heptanes plus.",
      error: measured(
        "z within 0.6 % (Kay 1.3 %) of the laboratory on average on six condensate gases; Kay within 0.9 % of GERG-2008 on five dry gases, where Piper's form misses by 2.7 %.",
      ),
      usedIn: "Fluid, beside the gravity's z",
    },
    {
      name: "z factor",
      gives: "Deviation of a gas from the ideal, by corresponding states.",
      source: "P. M. Dranchuk, J. H. Abou-Kassem, J. Can. Pet. Technol. 14 (July–Sept. 1975) 34–36",
      range:
        "Reduced pressure 0.2–30, reduced temperature 1–3. Warns below a reduced temperature of 1.15 and above the range.",
      error: measured(
        "0.30 % on average against 495 readings of the Standing–Katz chart from a reduced temperature of 1.2; 2 % at 1.10, 5 % at 1.05.",
      ),
      usedIn: "Every estimate, calculation “z-factor”",
    },
    {
      name: "Formation volume factor and density",
      gives: "Reservoir volume of a standard volume, and weight of gas in place.",
      source: "Real gas law with R = 10.731577 psia ft³/(lbmol °R)",
      range: "Any state of one phase.",
      error: exact("As good as z."),
      usedIn: "Every estimate",
    },
    {
      name: "Gas viscosity",
      gives: "Viscosity of reservoir gas.",
      source: "A. L. Lee, M. H. Gonzalez, B. E. Eakin, J. Pet. Technol. 18 (Aug. 1966) 997–1000",
      range: "100–340 °F, 100–8,000 psia, sweet gas. Warns outside.",
      error: stated("About 3 % standard deviation, 9 % at most (from memory)."),
      usedIn: "Calculation “z-factor”, near-well loss",
    },
    {
      name: "Heating value, Wobbe index, relative density",
      gives: "Gross and net heat of real and ideal gas at 14.696 psia and 60 °F.",
      source: "ISO 6976:2016; component values from memory",
      range:
        "Compression factor above 0.9 at standard conditions. Heptanes plus counts as paraffins of its weight, and a warning says so from 3 % of the heat.",
      error: measured(
        "The standard's first worked example to its last digit; ideal values of GPA 2145 within 0.2 Btu/scf. Naphthenes and aromatics give 1 to 5 % less than paraffins.",
      ),
      usedIn: "Fluid, surface gas",
    },
    {
      name: "Plant liquids",
      gives: "Gallons of ethane and heavier in a thousand cubic feet.",
      source: "GPA Midstream Standard 2145; from memory",
      range: "Ideal gas at 14.696 psia and 60 °F. All of it, not what a plant recovers.",
      error: exact("Exact in the standard's constants."),
      usedIn: "Fluid, surface gas",
    },
  ],
};

const equationOfState: MethodGroup = {
  id: "equation-of-state",
  title: "Equation of state",
  note: "A model of the fluid. Untuned it shows a mismatch, not a fact: the measured dew point stands beside it.",
  methods: [
    {
      name: "Peng–Robinson",
      gives: "Volumes and fugacities of gas and liquid.",
      source:
        "D. Y. Peng, D. B. Robinson, Ind. Eng. Chem. Fundam. 15 (1976) 59–64 and GPA RR-28 (1978); volume translation after A. Peneloux, E. Rauzy, R. Freze (1982)",
      range: "Hydrocarbons, N₂, CO₂, H₂S. No water.",
      error: measured(
        "Pure components boil within 1 to 3 % of their reference pressures. Untuned on the third comparative solution project: dew point 3,516 psig (Kesler–Lee) or 3,427 (Twu) with heptanes plus whole, 3,840 in three fractions, against 3,428 measured; most liquid about 30 % of the cell against 20 %. On a heavier North Sea fluid 6,200 psia in three fractions against 6,765.",
      ),
      usedIn: "Fluid, phase behaviour and separators",
    },
    {
      name: "Splitting heptanes plus",
      gives: "Two to five fractions instead of one; moles, mass and volume stay.",
      source:
        "C. H. Whitson, SPE J. 23 (Aug. 1983) 683–694 (gamma distribution, Gauss–Laguerre quadrature); specific gravities by I. Soreide (1989). Measured carbon numbers are lumped instead: W. D. Fisher, J. Am. Stat. Assoc. 53 (1958) 789–798",
      range: "Shape 0.5 to 2.5. Refused where heptanes plus is lighter than the lightest fraction.",
      error: exact("Balances are exact; the shape is an assumption."),
      usedIn: "Fluid, equation of state",
    },
    {
      name: "Properties of heavy fractions",
      gives: "Boiling point, critical point and acentric factor from weight and gravity.",
      source:
        "I. Soreide, thesis, NTH (1989); M. G. Kesler, B. I. Lee, Hydrocarbon Processing 55 (March 1976) 153–158; C. H. Twu, Fluid Phase Equilibria 16 (1984) 137–150; constants from memory",
      range: "Molecular weights to about 700; warns beyond.",
      error: measured(
        "n-Heptane to n-decane: critical temperature within 0.5 %, critical pressure within 1.5 % (Twu) and 3.5 % (Kesler–Lee). Boiling points within 25 °R of the generalised table.",
      ),
      usedIn: "Fluid, equation of state",
    },
    {
      name: "Interactions and volume shifts",
      gives: "How components mix, and the density of the heavy end.",
      source:
        "C. H. Whitson, M. R. Brule, Phase Behavior, SPE Monograph 20 (2000); B. S. Jhaveri, G. K. Youngren, SPE Reservoir Eng. 3 (Aug. 1988) 1033–1040; from memory",
      range:
        "Methane with heptanes plus 0.14 g − 0.0688; the heavy end's shift gives its specific gravity at 60 °F.",
      error: unknown("Typical published values. They are what a regression moves first."),
      usedIn: "Fluid, equation of state",
    },
    {
      name: "Flash, saturation pressures, phase envelope",
      gives: "How much gas and liquid, where the first drop appears, and the diagram.",
      source:
        "M. L. Michelsen, Fluid Phase Equilib. 4 (1980) 1–10, 9 (1982) 1–19 and 21–40; C. H. Whitson, M. L. Michelsen, Fluid Phase Equilib. 53 (1989) 51–71",
      range: "What does not converge is said, never shown.",
      error: measured("Dew points agree with a separate implementation within 1 psi."),
      usedIn: "Fluid, phase behaviour",
    },
    {
      name: "Separators",
      gives: "Gas, condensate and yield of a wellstream through any train of stages.",
      source: "Flash after flash, liquid going on; the last stage is the stock tank",
      range: "One to six stages, pressure falling.",
      error: measured(
        "Third comparative solution project: first-stage gas 750.5 Mscf per MMscf against 750.46 published, condensate 138 STB against 131.",
      ),
      usedIn: "Fluid; a computed separator sheet is marked as computed",
    },
    {
      name: "Tuning",
      gives: "Factors on the heavy end that bring dew point and liquid to the laboratory's.",
      source:
        "Levenberg and Marquardt's method; few heavy-end parameters after K. H. Coats, G. T. Smart, SPE Reservoir Eng. 1 (May 1986) 277–299. Weights and bounds: common practice, no source",
      range: "Only what was ticked moves, within bounds; a factor at its bound is named.",
      error: measured(
        "Third comparative solution project: dew point within 0.2 %, liquid within 1.5 points on average, produced wellstream within 1 point.",
      ),
      usedIn: "Fluid, tuning; a proposal until somebody accepts it",
    },
  ],
};

const depletion: MethodGroup = {
  id: "depletion",
  title: "Depletion studies",
  note: "A laboratory's constant-volume depletion is checked against itself before it carries a recovery.",
  methods: [
    {
      name: "Balance of a study",
      gives: "Whether moles, components and liquid density of the table agree.",
      source: "C. H. Whitson, S. B. Torp, J. Pet. Technol. 35 (March 1983) 610–620",
      range: "Limits at which a check warns or fails: common practice, no source.",
      error: exact("Exact balances; nothing is corrected."),
      usedIn: "Fluid, depletion",
    },
    {
      name: "Hoffmann plot",
      gives: "Whether the K values of a study fall on a line.",
      source: "A. E. Hoffmann, J. S. Crump, C. R. Hocott, Trans. AIME 198 (1953) 1–10",
      range: "Hydrocarbons; acid gases and nitrogen stand beside the line.",
      error: unknown("A fifth off the line is worth a question: common practice, no source."),
      usedIn: "Fluid, depletion",
    },
    {
      name: "Two-phase z",
      gives: "What gas and retrograde liquid together are worth in a material balance.",
      source: "C. H. Whitson, S. B. Torp (1983)",
      range: "From the moles left in the cell.",
      error: exact("Exact; within 0.001 of the published column of the third comparative project."),
      usedIn: "Fluid, depletion; recovery",
    },
    {
      name: "Surface products of a study",
      gives: "Condensate and gas at the surface, step by step.",
      source:
        "M. B. Standing, Volumetric and Phase Behavior of Oil Field Hydrocarbon Systems, SPE (1977); C. H. Whitson, S. B. Torp (1983)",
      range: "Separators by the equation of state.",
      error: measured(
        "Third comparative solution project, condensate recovered to 700 psig: 0.23 of that in place against 0.223 published.",
      ),
      usedIn: "Fluid, depletion; recovery curve",
    },
    {
      name: "Separators by K values",
      gives: "The same where no equation of state is set up.",
      source:
        "M. B. Standing, J. Pet. Technol. 31 (Sept. 1979) 1193–1195; coefficients from memory",
      range: "Below 1,000 psia and 200 °F.",
      error: measured(
        "5 % more condensate, 4 % less first-stage gas than published on that fluid.",
      ),
      usedIn: "Recovery curve, as a fallback",
    },
    {
      name: "Simulated depletion",
      gives: "A depletion table from the equation of state.",
      source: "C. H. Whitson, S. B. Torp (1983), with the flash above",
      range: "Fluids with a dew point at reservoir temperature.",
      error: measured(
        "Agrees with a separate implementation to 0.001 %. As a prediction it is as good as the tuning.",
      ),
      usedIn: "Fluid, depletion; marked untuned until tuned",
    },
  ],
};

const recovery: MethodGroup = {
  id: "recovery",
  title: "Recovery",
  note: "Four routes, in the order of trust: laboratory depletion, tuned equation of state, untuned one, correlation. The route stays with the figure.",
  methods: [
    {
      name: "Depletion and compression",
      gives: "Gas and condensate produced to an abandonment pressure.",
      source: "C. H. Whitson, S. B. Torp (1983)",
      range:
        "Expansion by p/z to the dew point, then the curve. A pressure below the end of the curve is refused, not extended.",
      error: exact(
        "Exact on the curve; a factor with its own range says how far the curve may be off.",
      ),
      usedIn: "Estimates with a recovery plan",
    },
    {
      name: "Gas cycling and blowdown",
      gives:
        "Condensate displaced by dry gas, then depletion of the rest, with fuel and make-up gas.",
      source:
        "C. H. Whitson, M. R. Brule, SPE Monograph 20 (2000), ch. 8; one sweep and one displacement efficiency: common practice, no source",
      range:
        "Liquid that has dropped out stays, on the safe side, unless the plan lets injected gas take it up.",
      error: measured(
        "With 0.6 swept, 0.9 displaced and complete uptake 0.67 against 0.665 of an open simulation of the third comparative study; without uptake 0.41. As good as the sweep: use a simulation study before spending money.",
      ),
      usedIn: "Estimates with a recovery plan, concepts side by side",
    },
    {
      name: "Water influx",
      gives: "Gas pushed out and trapped behind water.",
      source:
        "R. G. Agarwal, R. Al-Hussainy, H. J. Ramey, J. Pet. Technol. 17 (Nov. 1965) 1336–1342; from memory",
      range: "Invaded share and trapped saturation as entered; no aquifer model.",
      error: unknown("As good as the two inputs."),
      usedIn: "Estimates with a recovery plan",
    },
    {
      name: "Recovery without a composition",
      gives: "A curve from yield, temperature, gravity and dew point.",
      source:
        "Family of R. H. Jacoby, R. C. Koeller, V. J. Berry (1959) and B. A. Eaton, R. H. Jacoby (1965); coefficients from memory and not confirmed",
      range:
        "Screening of depletion to 500 psig, from a dew point of 1,000 psia or more; the curve's shape is that of one published study.",
      error: measured(
        "Condensate about 12 % off on two published fluids; gas 8 points too high at 700 psig.",
      ),
      usedIn: "Estimates, marked as a correlation",
    },
    {
      name: "Gas in place from pressures",
      gives: "Wellstream, dry gas and condensate in place from reservoir pressures and production.",
      source:
        "Straight line of p/z against the wellstream produced, with two-phase z below the dew point: J. Hagoort, Fundamentals of Gas Reservoir Engineering (1988), ch. 10; abnormal pressure after R. J. Hammerlindl, SPE 3479 (1971); both from memory",
      range:
        "Three pressures or more of a closed reservoir; no influx of water, no expansion of rock. Warns of few points, of p/z fallen by less than 10 %, of a line that bends (all common practice, no source) and above 0.5 psi/ft.",
      error: measured(
        "Third comparative solution project: its published surface products give the gas in place within 0.5 %; with the gas's own z it comes out more than 3 % short.",
      ),
      usedIn: "Fluid, calculation “material-balance”",
    },
    {
      name: "Near-well condensate",
      gives: "Rate with a bank of liquid over the rate of gas alone.",
      source:
        "O. Fevang, C. H. Whitson, SPE Reservoir Eng. 11 (Nov. 1996) 221–230; gas pseudo-pressure after R. Al-Hussainy, H. J. Ramey, P. B. Crawford, J. Pet. Technol. 18 (May 1966) 624–636",
      range:
        "Steady flow, Corey relative permeability as entered. Without the effects of velocity and capillary number; on the low side.",
      error: unknown("An estimate of size; a well test measures it."),
      usedIn: "Reservoir, concepts",
    },
    {
      name: "Condensate viscosity",
      gives: "Viscosity of liquid in the reservoir, for the near-well loss.",
      source:
        "J. Lohrenz, B. G. Bray, C. R. Clark, J. Pet. Technol. 16 (Oct. 1964) 1171–1176; coefficients from memory",
      range: "Critical points before tuning. Very sensitive to density.",
      error: stated(
        "16 % on reservoir liquids; 25 to 50 % is common for heavy ends that were not tuned to it (from memory).",
      ),
      usedIn: "Near-well condensate",
    },
  ],
};

const estimates: MethodGroup = {
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
        "Latin hypercube: M. D. McKay, R. J. Beckman, W. J. Conover, Technometrics 21 (1979) 239–245",
      range:
        "10,000 trials unless asked otherwise. Same inputs, seed and engine give the same bytes.",
      error: stated("Standard errors stand with the results; those shown are on the safe side."),
      usedIn: "Every estimate",
    },
    {
      name: "Rank correlation",
      gives: "Inputs that move together.",
      source: "R. L. Iman, W. J. Conover, Commun. Stat. Simul. Comput. 11 (1982) 311–334",
      range: "A set of correlations that cannot be is refused.",
      error: measured(
        "A published worked example by S. J. Mildenhall (2006) to its last digit; Spearman correlations of what was asked, to sampling error.",
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
      name: "What drives the range",
      gives: "Inputs by their share of the spread.",
      source: "A. Saltelli et al., Global Sensitivity Analysis: the Primer (2008), section 1.2",
      range: "Squared rank correlations. Shares of correlated inputs overlap.",
      error: exact("A description of the sample."),
      usedIn: "Results",
    },
  ],
};

const portfolio: MethodGroup = {
  id: "portfolio",
  title: "Portfolio and value",
  note: "Percentiles do not add: an arithmetic sum is shown only under that name.",
  methods: [
    {
      name: "Totals",
      gives: "Range of a sum of fields, trial by trial.",
      source:
        "One-factor normal copula a basin: A. J. McNeil, R. Frey, P. Embrechts, Quantitative Risk Management, 2nd ed. (2015), section 7.3",
      range: "Basins are independent of each other. A portfolio's P90 is no reserves category.",
      error: measured(
        "Ten lognormal fields against the closed form and the approximation of Fenton and Wilkinson.",
      ),
      usedIn: "Portfolio, fields, exports",
    },
    {
      name: "Risk",
      gives: "Figures times the chance of commerciality.",
      source: "Expectation, trial by trial",
      range: "The mean is exact; the chance of nothing is not in the range, and screens say so.",
      error: exact("The mean is exact."),
      usedIn: "Portfolio, fields, when the basis is risked",
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

const conditions: MethodGroup = {
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

export const methodGroups: readonly MethodGroup[] = [
  separatorTests,
  compositions,
  gases,
  equationOfState,
  depletion,
  recovery,
  estimates,
  portfolio,
  conditions,
];
