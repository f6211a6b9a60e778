import { hasFinishedDemoLoad } from "@/models/queries/demo-loads";

/** Whether this installation shows the demo. Needs nobody: the sign-in page offers its accounts. */
export async function holdsDemo(): Promise<boolean> {
  return hasFinishedDemoLoad();
}
