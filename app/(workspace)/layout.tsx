import type { ReactNode } from "react";
import { loadDecks, loadWorkspace } from "@/app/_workspace/load-workspace";
import { WorkspaceFrame } from "@/app/_workspace/workspace-frame";

/** Pages whose figures stand on the basis. Takes a signed-in person. */
export default async function WorkspaceLayout({ children }: { children: ReactNode }) {
  const [workspace, decks] = await Promise.all([loadWorkspace(), loadDecks()]);
  return (
    <WorkspaceFrame {...workspace} decks={decks}>
      {children}
    </WorkspaceFrame>
  );
}
