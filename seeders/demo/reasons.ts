import type { InputName } from "@/analytics/volumetrics/inputs-schema";

/** What experts say of an ordinary range: first with one well, then with an appraised field. */
interface DemoReasons {
  early: string;
  later: readonly string[];
}

const demoReasons: Readonly<Record<InputName, DemoReasons>> = {
  areaAcres: {
    early:
      "One well. P90 is the area above the lowest gas it saw, P10 the closure to spill on the regional map.",
    later: [
      "P90 closes at the lowest gas seen in any well, P10 at the spill point of the deepest depth conversion.",
      "P90 and P10 are the areas of the shallowest and deepest of nine depth conversions at the contact from pressures.",
      "The contact is known; the range is that of the flank's dip between the wells and the seismic's edge.",
    ],
  },
  netThicknessFt: {
    early:
      "The well's net pay, with the spread of net-to-gross among discoveries in the same play.",
    later: [
      "Average of the wells' net pay; the ends take the cut-offs half a step looser and tighter.",
      "Isochore between two mapped surfaces; P90 has the thinnest well's net-to-gross everywhere, P10 the thickest's.",
    ],
  },
  porosity: {
    early:
      "Density log of one well without core; widened by two porosity units for the unknown matrix.",
    later: [
      "Uncertainty of the average, not the spread of plugs: core to log within one porosity unit, wells within two.",
      "The averages of the wells span this range; core and log agree where both exist.",
    ],
  },
  waterSaturation: {
    early: "Archie with an assumed m of 2 and a regional water; the ends take m of 1.8 and 2.2.",
    later: [
      "Archie with m and n from core; the ends take the freshest and saltiest water sampled in the area.",
      "Capillary pressures and log agree at the well; the ends are the two fits of the height function.",
    ],
  },
  pressurePsia: {
    early:
      "One set of formation pressures at the datum; the range is the gauge and the depth together.",
    later: [
      "Formation pressures of all wells at the datum; the range is the gauges and the depth.",
    ],
  },
  temperatureDegF: {
    early: "Extrapolated from logging runs; corrected with the usual two to four degrees.",
    later: ["Stabilised gauge during the test; the range is the gradient between gauge and datum."],
  },
  condensateYieldStbPerMmscf: {
    early: "One test at one rate; 7 % either way is what a repeat usually shows.",
    later: [
      "Recombined at the sheet's ratio; 7 % either way covers the meters and the stabilised rate.",
    ],
  },
  gasRecovery: {
    early: "Analogues from the basin, without a view of the abandonment pressure.",
    later: [
      "p/z to the abandonment pressure of the nearest plant; the ends are the line with and without compression.",
    ],
  },
  condensateRecovery: {
    early: "Analogues of like richness; the low end is what the richest of them recovered.",
    later: [
      "Analogues of like richness by depletion; liquid that drops out in the reservoir is counted as lost.",
    ],
  },
  salesGasFraction: {
    early: "Fuel of 3 to 6 % and shrinkage of a plant like the nearest one.",
    later: [
      "Fuel, flare and shrinkage over three years of the nearest plant, lowest to highest year.",
    ],
  },
};

/**
 * Why an input has its range.
 *
 * @param isEarly  the revision was made with one well
 * @param pick     a number that belongs to the reservoir, so that no two neighbours say the same
 */
export function reasonFor(input: InputName, isEarly: boolean, pick: number): string {
  const { early, later } = demoReasons[input];
  return isEarly ? early : later[pick % later.length];
}
