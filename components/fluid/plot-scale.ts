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

/** A line in percent, cut where it leaves the box to the left or right; what lies outside is left out. */
export function clippedLine(points: readonly Point[]): Point[] {
  const isIn = ([x]: Point) => x >= -1e-9 && x <= 100 + 1e-9;
  const edge = (inside: Point, outside: Point): Point => {
    const x = outside[0] < 0 ? 0 : 100;
    const share = (x - inside[0]) / (outside[0] - inside[0]);
    return [x, inside[1] + (outside[1] - inside[1]) * share];
  };
  return points.flatMap((point, index) => {
    const before = index === 0 ? null : points[index - 1];
    if (isIn(point)) return before && !isIn(before) ? [edge(point, before), point] : [point];
    return before && isIn(before) ? [edge(before, point)] : [];
  });
}

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
