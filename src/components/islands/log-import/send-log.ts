import { logQuestionsSchema, logSchema, type Log, type LogQuestions } from '~/lib/contracts/logs';
import { problemSchema } from '~/lib/contracts/common';
import { ApiProblem, NoAnswer } from '~/lib/client/api';
import type { Mapping } from '~/lib/logs/schema';

export type Sent =
  { readonly kind: 'read'; readonly log: Log } | { readonly kind: 'asked'; readonly questions: LogQuestions };

/** What an answer to an upload or to its answers means. */
function sentOf(status: number, body: unknown): Sent {
  if (status >= 200 && status < 300) return { kind: 'read', log: logSchema.parse(body) };
  const asked = logQuestionsSchema.safeParse(body);
  if (asked.success) return { kind: 'asked', questions: asked.data };
  const problem = problemSchema.safeParse(body);
  if (problem.success) throw new ApiProblem(problem.data);
  throw new ApiProblem({
    type: 'about:blank',
    title: 'Unexpected answer',
    status,
    detail: `The server answered ${status} without saying why. Send the file again.`,
    code: 'unexpected-answer',
  });
}

/**
 * Sends a file and tells how far it is. `XMLHttpRequest`, since `fetch` cannot say how much of a body has left.
 *
 * @throws {ApiProblem} the server refused it
 * @throws {NoAnswer} the connection was lost; nothing was kept
 */
export function sendLog(
  runId: string,
  file: File,
  onProgress: (share: number) => void,
  signal: AbortSignal,
): Promise<Sent> {
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest();
    request.open('POST', `/api/runs/${encodeURIComponent(runId)}/logs`);
    request.responseType = 'json';
    request.setRequestHeader('accept', 'application/json');
    request.upload.onprogress = (event) =>
      onProgress(event.lengthComputable && event.total > 0 ? event.loaded / event.total : 0);
    request.onload = () => {
      try {
        resolve(sentOf(request.status, request.response));
      } catch (error) {
        reject(error instanceof Error ? error : new Error(String(error)));
      }
    };
    request.onerror = () => reject(new NoAnswer(new Error('upload failed')));
    request.onabort = () => reject(new DOMException('stopped by the person', 'AbortError'));
    signal.addEventListener('abort', () => request.abort());
    const form = new FormData();
    form.append('file', file, file.name);
    request.send(form);
  });
}

/** Answers the questions about a kept file. */
export async function sendAnswers(runId: string, logId: string, mapping: Mapping): Promise<Sent> {
  let response: Response;
  try {
    response = await fetch(
      `/api/runs/${encodeURIComponent(runId)}/logs/${encodeURIComponent(logId)}/answers`,
      {
        method: 'POST',
        headers: { 'content-type': 'application/json', accept: 'application/json' },
        body: JSON.stringify({ mapping }),
      },
    );
  } catch (cause) {
    throw new NoAnswer(cause);
  }
  return sentOf(response.status, await response.json().catch(() => null));
}
