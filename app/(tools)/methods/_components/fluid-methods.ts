/** Methods on fluids: from the laboratory sheet to what each way of producing recovers. */
import { exact, measured, stated, unknown, type MethodGroup } from "./method";

export const separatorTests: MethodGroup = {
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

export const compositions: MethodGroup = {
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

export const gases: MethodGroup = {
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

export const equationOfState: MethodGroup = {
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

export const depletion: MethodGroup = {
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

export const recovery: MethodGroup = {
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
        "Screening of depletion to 500 psig, from a dew point of 1,000 psia or more; gas and liquid balance with the yields, solution gas and shrinkage of one published study, bent to that recovery.",
      error: measured(
        "Condensate about 12 % off on two published fluids; moles produced within a point on the one whose shape it takes.",
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
