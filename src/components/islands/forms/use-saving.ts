import { useState } from 'react';
import type { FieldValues, Path, UseFormSetError } from 'react-hook-form';
import { ApiProblem, sentenceFor } from '~/lib/client/api';

/**
 * Sends a form and goes to the page that shows what was saved. A problem stays on the page: its fields are marked, its
 * sentence is shown, and nothing typed is lost.
 *
 * @param save calls the server; gives the address to go to
 */
export function useSaving<Typed extends FieldValues, Sent>(
  setError: UseFormSetError<Typed>,
  save: (sent: Sent) => Promise<string>,
) {
  const [problem, setProblem] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const submit = async (sent: Sent): Promise<void> => {
    setBusy(true);
    setProblem(null);
    try {
      window.location.assign(await save(sent));
    } catch (error) {
      setBusy(false);
      setProblem(sentenceFor(error));
      if (!(error instanceof ApiProblem)) return;
      for (const issue of error.problem.errors ?? [])
        setError(issue.path as Path<Typed>, { message: issue.message });
    }
  };
  return { submit, problem, busy };
}
