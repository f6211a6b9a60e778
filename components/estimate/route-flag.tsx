import type { RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import { routeWords } from "@/components/fluid/available-curves";
import { Flag, VisuallyHidden } from "@/components/ui/text";
import { routeMark } from "./plan-words";

const shortMarks: Partial<Record<RecoveryRoute, string>> = {
  untunedEquationOfState: "Untuned",
  correlation: "Correlated",
};

/** Stands wherever a recovery goes that no measured depletion stands behind; nothing for the others. */
export function RouteFlag({
  route,
  short = false,
}: {
  route: RecoveryRoute | null | undefined;
  /** one word, for the row of a list */
  short?: boolean;
}) {
  const mark = routeMark(route);
  if (!route || mark === null) return null;
  return (
    <Flag
      icon={short ? undefined : "warning"}
      title={`Recovery ${mark}. ${routeWords[route].note}`}
    >
      {short ? shortMarks[route] : `Recovery ${mark}`}
      {short && <VisuallyHidden> recovery</VisuallyHidden>}
    </Flag>
  );
}
