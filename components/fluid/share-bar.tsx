import { percent } from "@/components/charts/scale";
import { toneOfComponent } from "./component-names";

/** A component's share, as long as it is large; the figure stands beside it. */
export function ShareBar({ symbol, share }: { symbol: string; share: number }) {
  if (share <= 0) return null;
  return (
    <i
      className="share-bar"
      data-component={toneOfComponent(symbol)}
      style={{ width: percent(Math.min(1, share) * 100) }}
    />
  );
}
