/** Boiling point and critical properties of petroleum fractions from molecular weight and specific gravity. */
import { DomainError } from "../errors";

export interface CriticalProperties {
  readonly criticalTemperatureDegR: number;
  readonly criticalPressurePsia: number;
  readonly acentricFactor: number;
}

const ATMOSPHERE_PSIA = 14.696;

function assertFraction(molecularWeight: number, specificGravity: number): void {
  if (!(molecularWeight >= 70 && molecularWeight <= 2000)) {
    throw new DomainError(
      `A fraction of heptanes plus cannot have a molecular weight of ${molecularWeight} lb/lbmol`,
      { input: "molecularWeight", value: molecularWeight },
    );
  }
  if (!(specificGravity >= 0.6 && specificGravity <= 1.2)) {
    throw new DomainError(
      `A fraction of heptanes plus cannot have a specific gravity of ${specificGravity}`,
      { input: "specificGravity", value: specificGravity },
    );
  }
}

/**
 * Normal boiling point of a petroleum fraction by Soreide, degR. Constants from memory.
 *
 *     Tb = 1928.3 - 1.695e5 M^-0.03522 g^3.266 exp(-4.922e-3 M - 4.7685 g + 3.462e-3 M g)
 *
 * Range: M 90 to 560, about 20 degR off on average (from memory).
 *
 * @throws {DomainError} when no petroleum fraction has such a molecular weight or specific gravity
 * @example boilingPointDegR(140, 0.774) // => 803.78
 * @see I. Soreide, Dr.Ing. thesis, Norwegian Institute of Technology (1989)
 */
export function boilingPointDegR(molecularWeight: number, specificGravity: number): number {
  assertFraction(molecularWeight, specificGravity);
  return (
    1928.3 -
    1.695e5 *
      molecularWeight ** -0.03522 *
      specificGravity ** 3.266 *
      Math.exp(
        -4.922e-3 * molecularWeight -
          4.7685 * specificGravity +
          3.462e-3 * molecularWeight * specificGravity,
      )
  );
}

/**
 * Critical temperature, pressure and acentric factor by Kesler and Lee. Constants from memory. With Tb in degR:
 *
 *     Tc = 341.7 + 811 g + (0.4244 + 0.1174 g) Tb + (0.4669 - 3.2623 g) 1e5/Tb
 *     ln Pc = 8.3634 - 0.0566/g - (0.24244 + 2.2898/g + 0.11857/g2) 1e-3 Tb
 *               + (1.4685 + 3.648/g + 0.47227/g2) 1e-7 Tb2 - (0.42019 + 1.6977/g2) 1e-10 Tb3
 *
 * Range: fractions up to a molecular weight of about 700, as published.
 *
 * @example keslerLee(803.78, 0.774)
 *   // => { criticalTemperatureDegR: 1127.52, criticalPressurePsia: 343.692, acentricFactor: 0.46117 }
 * @see M. G. Kesler, B. I. Lee, Hydrocarbon Processing 55 (March 1976) 153-158
 */
export function keslerLee(boilingPoint: number, specificGravity: number): CriticalProperties {
  const tb = boilingPoint;
  const g = specificGravity;
  const criticalTemperatureDegR =
    341.7 + 811 * g + (0.4244 + 0.1174 * g) * tb + ((0.4669 - 3.2623 * g) * 1e5) / tb;
  const criticalPressurePsia = Math.exp(
    8.3634 -
      0.0566 / g -
      (0.24244 + 2.2898 / g + 0.11857 / g ** 2) * 1e-3 * tb +
      (1.4685 + 3.648 / g + 0.47227 / g ** 2) * 1e-7 * tb ** 2 -
      (0.42019 + 1.6977 / g ** 2) * 1e-10 * tb ** 3,
  );
  return {
    criticalTemperatureDegR,
    criticalPressurePsia,
    acentricFactor: acentricFactor(tb, g, criticalTemperatureDegR, criticalPressurePsia),
  };
}

/**
 * Acentric factor of a fraction: the vapour-pressure equation of Lee and Kesler through the normal boiling point up to
 * a reduced boiling point of 0.8, the correlation of Kesler and Lee in the Watson factor above. From memory.
 */
function acentricFactor(
  boilingPoint: number,
  specificGravity: number,
  criticalTemperatureDegR: number,
  criticalPressurePsia: number,
): number {
  const theta = boilingPoint / criticalTemperatureDegR;
  if (theta > 0.8) {
    const watson = Math.cbrt(boilingPoint) / specificGravity;
    return (
      -7.904 +
      0.1352 * watson -
      0.007465 * watson ** 2 +
      8.359 * theta +
      (1.408 - 0.01063 * watson) / theta
    );
  }
  const ln = Math.log(theta);
  return (
    (Math.log(ATMOSPHERE_PSIA / criticalPressurePsia) -
      5.92714 +
      6.09648 / theta +
      1.28862 * ln -
      0.169347 * theta ** 6) /
    (15.2518 - 15.6875 / theta - 13.4721 * ln + 0.43577 * theta ** 6)
  );
}

/**
 * Critical temperature and pressure by Twu: the n-alkane of the same boiling point, corrected for the difference in
 * specific gravity. The acentric factor follows from both as with `keslerLee`. Constants from memory.
 *
 * Range: n-alkanes to C100, fractions with boiling points to about 1,800 degR, as published.
 *
 * @example twu(805.1, 0.7342) // => { criticalTemperatureDegR: 1114.348, criticalPressurePsia: 307.84, … }
 * @see C. H. Twu, Fluid Phase Equilibria 16 (1984) 137-150
 */
export function twu(boilingPoint: number, specificGravity: number): CriticalProperties {
  const tb = boilingPoint;
  const root = Math.sqrt(tb);
  const alkaneTemperature =
    tb /
    (0.533272 +
      0.191017e-3 * tb +
      0.779681e-7 * tb ** 2 -
      0.284376e-10 * tb ** 3 +
      0.959468e28 / tb ** 13);
  const a = 1 - tb / alkaneTemperature;
  const alkanePressure =
    (3.83354 + 1.19629 * Math.sqrt(a) + 34.8888 * a + 36.1952 * a ** 2 + 104.193 * a ** 4) ** 2;
  const alkaneGravity = 0.843593 - 0.128624 * a - 3.36159 * a ** 3 - 13749.5 * a ** 12;

  const correction = (f: number) => ((1 + 2 * f) / (1 - 2 * f)) ** 2;
  const dt = Math.exp(5 * (alkaneGravity - specificGravity)) - 1;
  const temperature =
    alkaneTemperature * correction(dt * (-0.362456 / root + (0.0398285 - 0.948125 / root) * dt));
  const dv = Math.exp(4 * (alkaneGravity ** 2 - specificGravity ** 2)) - 1;
  const volumeRatio = correction(dv * (0.46659 / root + (-0.182421 + 3.01721 / root) * dv));
  const dp = Math.exp(0.5 * (alkaneGravity - specificGravity)) - 1;
  const pressure =
    alkanePressure *
    (temperature / alkaneTemperature / volumeRatio) *
    correction(
      dp *
        (2.53262 -
          46.1955 / root -
          0.00127885 * tb +
          (-11.4277 + 252.14 / root + 0.00230535 * tb) * dp),
    );
  return {
    criticalTemperatureDegR: temperature,
    criticalPressurePsia: pressure,
    acentricFactor: acentricFactor(tb, specificGravity, temperature, pressure),
  };
}
