import { QueryTypes } from "sequelize";
import { sequelize } from "../sequelize";

/** Failures of each subject in its present window; subjects without any are left out. */
export async function listSignInFailures(
  subjects: string[],
  windowFrom: Date,
): Promise<{ subject: string; failures: number; windowStartedAt: Date }[]> {
  return sequelize.query(
    `select subject, failures, window_started_at as "windowStartedAt" from sign_in_failures
      where subject in (:subjects) and window_started_at > :windowFrom`,
    { replacements: { subjects, windowFrom }, type: QueryTypes.SELECT },
  );
}

/** Count one more failure, in one statement so that parallel attempts are all counted; an old window begins anew. */
export async function countSignInFailure(
  subject: string,
  at: Date,
  windowFrom: Date,
): Promise<void> {
  await sequelize.query(
    `insert into sign_in_failures (subject, failures, window_started_at) values (:subject, 1, :at)
      on conflict (subject) do update set
        failures = case when sign_in_failures.window_started_at > :windowFrom
          then sign_in_failures.failures + 1 else 1 end,
        window_started_at = case when sign_in_failures.window_started_at > :windowFrom
          then sign_in_failures.window_started_at else excluded.window_started_at end`,
    { replacements: { subject, at, windowFrom } },
  );
}

export async function forgetSignInFailures(subjects: string[], windowFrom: Date): Promise<void> {
  await sequelize.query(
    `delete from sign_in_failures where subject in (:subjects) or window_started_at <= :windowFrom`,
    { replacements: { subjects, windowFrom } },
  );
}
