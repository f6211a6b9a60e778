import type { ReactNode } from "react";
import { SignInScene } from "@/components/layout/sign-in-scene";
import { Wordmark } from "@/components/layout/wordmark";

/** What a visitor sees before signing in: the scene at the left, one thing to do at the right. */
export function PublicPage({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div className="sign-in">
      <SignInScene />
      <main id="main" className="sign-in-form">
        <Wordmark href="/" size={28} />
        <h1>{title}</h1>
        {children}
        <p className="sign-in-caution">Planning estimates, not a reserves report.</p>
      </main>
    </div>
  );
}
