/** One line of a phase diagram, point by point. */
import {
  CurveTracer,
  hermite,
  steepest,
  straight,
  type CurvePoint,
  type CurveSystem,
} from "./curve-tracer";

/** Where the dew line begins and the bubble line ends, psia. */
export const LOWEST_PSIA = 14.696;
export const HIGHEST_PSIA = 20_000;
/** Where a line going to low temperature ends: -130 degF, below anything a reservoir or a separator sees. */
export const LOWEST_DEGR = 330;
const MAXIMUM_POINTS = 400;
/** Largest changes from one point to the next, for a smooth line. */
const LARGEST_LN_K = 0.8;
const LARGEST_LN_T = 0.03;
const LARGEST_LN_P = 0.2;
const SMALLEST_STEP = 1e-7;
/** No point is closer to the critical point than this in the held ln K. */
const CRITICAL_GAP = 0.03;

/** One line being followed. Unknowns are ln K_i, ln T, ln p and perhaps more. */
export class DiagramLine {
  readonly points: CurvePoint[] = [];
  readonly tracer: CurveTracer;

  constructor(
    system: CurveSystem,
    private readonly components: number,
  ) {
    this.tracer = new CurveTracer(system);
  }

  temperature(point: CurvePoint): number {
    return Math.exp(point.at[this.components]);
  }

  pressure(point: CurvePoint): number {
    return Math.exp(point.at[this.components + 1]);
  }

  /** Beyond the limits of the diagram, and on its way out: a line may begin in the cold and come in. */
  isLeaving(point: CurvePoint, last: CurvePoint): boolean {
    const pressure = this.pressure(point);
    const temperature = this.temperature(point);
    return (
      (pressure < LOWEST_PSIA && pressure < this.pressure(last)) ||
      (pressure > HIGHEST_PSIA && pressure > this.pressure(last)) ||
      (temperature < LOWEST_DEGR && temperature < this.temperature(last))
    );
  }

  /** Follows the line up from its first point, until `ends` or until no step converges. */
  follow(first: CurvePoint, ends: (point: CurvePoint, last: CurvePoint) => boolean): void {
    const { points } = this;
    points.push(first);
    // A first step along ln p, up.
    let held = this.components + 1;
    let step = 0.05;
    let last = first;
    while (points.length < MAXIMUM_POINTS) {
      const value = this.beyondCritical(last, held, last.at[held] + step);
      const before = points[points.length - 2];
      const guess = before ? hermite(before, last, held, value) : straight(last, held, value);
      const next = this.tracer.correct(guess, held, value);
      if (next === null || !this.isNear(last, next)) {
        step *= 0.5;
        if (Math.abs(step) < SMALLEST_STEP) return;
        continue;
      }
      points.push(next);
      if (ends(next, last)) return;
      const turn = steepest(next);
      // The same way along the curve, counted in the unknown that is held next.
      const way =
        Math.sign(next.at[held] - last.at[held]) *
        Math.sign(next.tangent[turn] / next.tangent[held]);
      const growth = this.tracer.iterations <= 3 ? 1.6 : this.tracer.iterations >= 6 ? 0.6 : 1;
      const scale = Math.abs(next.tangent[turn] / next.tangent[held]);
      step = way * this.limit(next, turn, Math.abs(value - last.at[held]) * scale * growth);
      held = turn;
      last = next;
    }
  }

  /** A step in the held unknown that changes no unknown by more than it may. */
  private limit({ tangent }: CurvePoint, held: number, step: number): number {
    const rate = (index: number) => Math.abs(tangent[index] / tangent[held]);
    return Math.min(
      step,
      LARGEST_LN_K,
      LARGEST_LN_T / rate(this.components),
      LARGEST_LN_P / rate(this.components + 1),
    );
  }

  private isNear(last: CurvePoint, next: CurvePoint): boolean {
    const change = (index: number) => Math.abs(next.at[index] - last.at[index]);
    return (
      change(this.components) < 3 * LARGEST_LN_T && change(this.components + 1) < 3 * LARGEST_LN_P
    );
  }

  /** Across the critical point rather than next to it, where both phases are one and the equations degenerate. */
  private beyondCritical(last: CurvePoint, held: number, value: number): number {
    if (held >= this.components) return value;
    const from = last.at[held];
    const arrives = from * value <= 0 || Math.abs(value) < CRITICAL_GAP;
    if (!arrives || Math.abs(value) > Math.abs(from)) return value;
    return -Math.sign(from) * Math.max(CRITICAL_GAP, Math.abs(value));
  }
}

/** The ln K of two points point opposite ways: the critical point lies between. */
export function isAcross(one: CurvePoint, other: CurvePoint, components: number): boolean {
  let product = 0;
  for (let i = 0; i < components; i += 1) product += one.at[i] * other.at[i];
  return product < 0;
}
