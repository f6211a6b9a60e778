import type { ReactNode } from "react";
import { loadBasisChoices, loadWorkspace } from "@/app/_workspace/load-workspace";
import { WorkspaceFrame } from "@/app/_workspace/workspace-frame";

/** Pages whose figures stand on the basis. Takes a signed-in person. */
export default async function WorkspaceLayout({ children }: { children: ReactNode }) {
  const [workspace, choices] = await Promise.all([loadWorkspace(), loadBasisChoices()]);
  return (
    <WorkspaceFrame {...workspace} choices={choices}>
      {children}
    </WorkspaceFrame>
  );
}
