"use client";

import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import type { EstimateBodyView } from "@/app/api/v1/estimates/schema";
import { resultFactor, resultUnit } from "@/components/estimate/result-rows";
import { SettleSteps } from "@/components/estimate/settle-steps";
import {
  halfWidthText,
  secondsLeft,
  settleEnd,
  settleFraction,
  trialsText,
} from "@/components/estimate/settle-words";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/choice";
import { NumberField } from "@/components/ui/field";
import { Section } from "@/components/ui/section";
import { Notice, Progress } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";
import { useUntilSettled } from "../_queries/until-settled";

const caps = [16_384, 65_536, 262_144, 1_048_576].map((trials) => ({
  value: String(trials),
  label: trialsText(trials),
}));

/** The tolerance in per cent as it was typed; what is no possible tolerance comes with the reason. */
export function readTolerance(text: string): { tolerance: number } | { problem: string } {
  const percent = Number(text.replace("%", "").replace(",", ".").trim());
  if (text.trim() === "" || !Number.isFinite(percent)) return { problem: "Type a number." };
  if (percent < 0.05 || percent > 10) return { problem: "From 0.05 to 10 %." };
  return { tolerance: percent / 100 };
}

/** Runs an open estimate with more and more trials until its percentiles are known well enough. */
export function SettlePanel() {
  const { shown, page } = useReservoir();
  const can = useCan();
  if (!shown?.can.run || shown.id !== page.open?.id || !can("run.create")) return null;
  return <OpenPanel key={shown.id} estimate={shown} />;
}

function OpenPanel({ estimate }: { estimate: EstimateBodyView }) {
  const { place, draft, resultBasis } = useReservoir();
  const settling = useUntilSettled(place, estimate.id);
  const { wish, run, item, begin, cancel } = settling;
  const [text, setText] = useState("1");
  const [cap, setCap] = useState("262144");
  const typed = readTolerance(text);
  const steps = item?.progress ?? [];
  const end = run && wish && settleEnd(run, item, wish);
  const isUnderWay = run !== null && end === null;
  const unsaved = draft !== null && !draft.isSaved;

  return (
    <Section
      title="Run until the percentiles are settled"
      note="Trials are doubled until P90, P50 and P10 of gas in place and of condensate to the tank are known well enough: until the half-width of the 95 % interval of each is no more than this share of it. It runs in the background; this page may be left."
    >
      {!isUnderWay && (
        <form
          className="flex flex-wrap items-start gap-3"
          onSubmit={(event) => {
            event.preventDefault();
            if ("tolerance" in typed && !unsaved) {
              begin.mutate({ tolerance: typed.tolerance, mostTrials: Number(cap) });
            }
          }}
        >
          <NumberField
            label="Within ±, 95 %"
            unit="%"
            className="w-28"
            value={text}
            error={"problem" in typed ? typed.problem : undefined}
            onChange={(event) => setText(event.target.value)}
          />
          <Select
            label="Trials at most"
            className="w-40"
            value={cap}
            options={caps}
            onChange={setCap}
          />
          <Button
            type="submit"
            className="mt-[22px]"
            busy={begin.isPending}
            busyLabel="Beginning…"
            disabled={unsaved || "problem" in typed}
          >
            {end ? "Run again" : "Run until settled"}
          </Button>
          {unsaved && (
            <p className="self-center text-13 text-ink-soft">
              Waits until what you typed is complete and saved.
            </p>
          )}
        </form>
      )}
      <div className="mt-4 grid gap-4" aria-live="polite">
        {begin.error && (
          <Notice tone="error" title="The run could not begin.">
            {errorWords(begin.error)} The results above stand.
          </Notice>
        )}
        {settling.error && (
          <Notice tone="warning" title="The run cannot be followed right now.">
            {errorWords(settling.error)} It goes on; reload to look again.
          </Notice>
        )}
        {isUnderWay && wish && (
          <Progress
            label={`Until within ${halfWidthText(wish.tolerance)}`}
            fraction={settleFraction(steps, wish)}
            detail={progressWords(run.stalled, steps, wish, settling.elapsedSeconds)}
            action={
              run.can.cancel && (
                <Button
                  size="small"
                  busy={cancel.isPending}
                  busyLabel="Cancelling…"
                  onClick={() => cancel.mutate(run)}
                >
                  Cancel
                </Button>
              )
            }
          />
        )}
        {end && (
          <Notice
            tone={end.tone}
            title={end.title}
            live={false}
            actions={
              <Button size="small" kind="quiet" onClick={settling.forget}>
                Put away
              </Button>
            }
          >
            {end.detail}
          </Notice>
        )}
        {wish && steps.length > 0 && (
          <SettleSteps
            steps={steps}
            tolerance={wish.tolerance}
            factor={resultFactor("condensateRecoverableStb", resultBasis)}
            unit={resultUnit("condensateRecoverableStb", resultBasis)}
          />
        )}
      </div>
    </Section>
  );
}

/** "16,384 trials, ±1.8 %, about 12 s left" */
function progressWords(
  isStalled: boolean,
  steps: Parameters<typeof secondsLeft>[0],
  wish: Parameters<typeof secondsLeft>[1],
  elapsedSeconds: number,
): string {
  if (isStalled) return "No worker has moved it for a while; it begins as soon as one is free";
  const last = steps.at(-1);
  if (!last) return "Waiting for the first trials";
  const left = secondsLeft(steps, wish, elapsedSeconds);
  const known = `${trialsText(last.trials)} trials, ${halfWidthText(last.worst)}`;
  return left === null ? known : `${known}, about ${Math.max(1, Math.round(left))} s left`;
}
