import type { RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import { routeWords } from "@/components/fluid/available-curves";
import { Flag } from "@/components/ui/text";
import { routeMark } from "./plan-words";

/** Stands wherever a recovery goes that no measured depletion stands behind; nothing for the others. */
export function RouteFlag({ route }: { route: RecoveryRoute | null | undefined }) {
  const mark = routeMark(route);
  if (!route || mark === null) return null;
  return (
    <Flag icon="warning" title={routeWords[route].note}>
      Recovery {mark}
    </Flag>
  );
}
