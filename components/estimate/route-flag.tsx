import type { RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import { routeWords } from "@/components/fluid/available-curves";
import { Flag } from "@/components/ui/text";
import { isWeakRoute } from "./plan-words";

const marks: Partial<Record<RecoveryRoute, string>> = {
  untunedEquationOfState: "Recovery from an untuned equation of state",
  correlation: "Recovery from a correlation",
};

/** Stands wherever a recovery goes that no measured depletion stands behind; nothing for the others. */
export function RouteFlag({ route }: { route: RecoveryRoute | null | undefined }) {
  if (!route || !isWeakRoute(route)) return null;
  return (
    <Flag icon="warning" title={routeWords[route].note}>
      {marks[route]}
    </Flag>
  );
}
