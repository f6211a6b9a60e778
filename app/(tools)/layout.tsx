import type { ReactNode } from "react";
import { loadWorkspace } from "@/app/_workspace/load-workspace";
import { WorkspaceFrame } from "@/app/_workspace/workspace-frame";

/** Pages that bring data in, let programs at it or explain the methods: the same shell, without a basis. Takes a signed-in person. */
export default async function ToolsLayout({ children }: { children: ReactNode }) {
  return <WorkspaceFrame {...await loadWorkspace()}>{children}</WorkspaceFrame>;
}
