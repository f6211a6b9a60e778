import { ticksOf, type Scale, type Tick } from "@/components/charts/scale";

/** A linear scale from zero, or from a round figure below, to a round figure above, with its ticks as ends. */
export function roundScale(
  values: readonly number[],
  {
    count = 5,
    fromZero = true,
    least = 0,
  }: { count?: number; fromZero?: boolean; least?: number } = {},
): Scale {
  const low = fromZero ? Math.min(0, ...values) : Math.min(...values);
  const high = Math.max(...values, low + least, low + 1e-9);
  const raw = (high - low) / count;
  const power = 10 ** Math.floor(Math.log10(raw));
  const step =
    [1, 2, 2.5, 5, 10].map((factor) => factor * power).find((size) => size >= raw - 1e-12) ?? raw;
  return {
    kind: "linear",
    domain: [Math.floor(low / step + 1e-9) * step, Math.ceil(high / step - 1e-9) * step],
  };
}

/** Ticks of a y axis: positions from the top. */
export const yTicksOf = (scale: Scale, count = 5, suffix = ""): Tick[] =>
  ticksOf(scale, count).map((tick) => ({
    ...tick,
    label: tick.label + suffix,
    position: 100 - tick.position,
  }));

type Point = readonly [number, number];

/** Positions moved apart so that labels at them do not overlap; the order stays. */
export function spread(positions: readonly number[], gap: number): number[] {
  const order = positions.map((position, index) => ({ position, index }));
  order.sort((a, b) => a.position - b.position);
  const placed = order.map(({ position }) => position);
  for (let pass = 0; pass < 40; pass += 1) {
    for (let i = 1; i < placed.length; i += 1) {
      const overlap = placed[i - 1] + gap - placed[i];
      if (overlap > 0) {
        placed[i - 1] -= overlap / 2;
        placed[i] += overlap / 2;
      }
    }
  }
  const moved = [...positions];
  order.forEach(({ index }, rank) => (moved[index] = placed[rank]));
  return moved;
}

/** A line in percent, cut to the box at all four sides: the parts of it that lie inside. */
export function partsInside(points: readonly Point[]): Point[][] {
  const parts: Point[][] = [];
  let goesOn = false;
  for (let i = 1; i < points.length; i += 1) {
    const [from, to] = [points[i - 1], points[i]];
    const shares = insideShares(from, to);
    if (shares) {
      const at = (share: number): Point => [
        from[0] + (to[0] - from[0]) * share,
        from[1] + (to[1] - from[1]) * share,
      ];
      if (!goesOn) parts.push([at(shares[0])]);
      parts[parts.length - 1].push(at(shares[1]));
    }
    goesOn = shares?.[1] === 1;
  }
  return parts;
}

/** From which share to which share of the way a straight piece lies inside the box; `null` for one outside. */
function insideShares(from: Point, to: Point): [number, number] | null {
  let [low, high] = [0, 1];
  for (const axis of [0, 1] as const) {
    const step = to[axis] - from[axis];
    if (Math.abs(step) < 1e-12) {
      if (from[axis] < 0 || from[axis] > 100) return null;
      continue;
    }
    const ends = [-from[axis] / step, (100 - from[axis]) / step];
    low = Math.max(low, Math.min(...ends));
    high = Math.min(high, Math.max(...ends));
  }
  return low < high ? [low, high] : null;
}

/** An area in percent, cut to the box at all four sides (Sutherland and Hodgman, Commun. ACM 17 (1974) 32). */
export function areaInside(points: readonly Point[]): Point[] {
  const sides = [
    { axis: 0, at: 0, sign: 1 },
    { axis: 0, at: 100, sign: -1 },
    { axis: 1, at: 0, sign: 1 },
    { axis: 1, at: 100, sign: -1 },
  ] as const;
  return sides.reduce<Point[]>(
    (area, { axis, at, sign }) => {
      const depth = (point: Point) => (point[axis] - at) * sign;
      return area.flatMap((to, index) => {
        const from = area[(index + area.length - 1) % area.length];
        const [before, now] = [depth(from), depth(to)];
        const share = before / (before - now);
        const cut: Point = [
          from[0] + (to[0] - from[0]) * share,
          from[1] + (to[1] - from[1]) * share,
        ];
        if (now >= 0) return before >= 0 ? [to] : [cut, to];
        return before >= 0 ? [cut] : [];
      });
    },
    [...points],
  );
}
