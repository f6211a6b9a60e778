import type { ReactNode } from "react";
import { loadWorkspace } from "@/app/_workspace/load-workspace";
import { WorkspaceFrame } from "@/app/_workspace/workspace-frame";

/** Pages about people and their accounts: the same shell, without a basis. Takes a signed-in person. */
export default async function AdministrationLayout({ children }: { children: ReactNode }) {
  return <WorkspaceFrame {...await loadWorkspace()}>{children}</WorkspaceFrame>;
}
