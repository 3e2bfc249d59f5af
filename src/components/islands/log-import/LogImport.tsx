import { islandProps } from '~/lib/client/island-props';
import { useEffect, useId, useMemo, useRef, useState, type DragEvent } from 'react';
import { sentenceFor } from '~/lib/client/api';
import type { Log, LogQuestions } from '~/lib/contracts/logs';
import type { Mapping } from '~/lib/logs/schema';
import { ImportReportView } from './ImportReportView';
import './log-import.css';
import '../strip/touch.css';
import { logImportPropsSchema, type LogImportProps } from './props';
import { Questions } from './Questions';
import { sendAnswers, sendLog, type Sent } from './send-log';

type Phase =
  | { readonly at: 'waiting' }
  | { readonly at: 'sending'; readonly name: string; readonly share: number }
  | { readonly at: 'reading'; readonly name: string }
  | { readonly at: 'asked'; readonly questions: LogQuestions; readonly mapping: Mapping }
  | { readonly at: 'read'; readonly log: Log };

/** Takes a thermocouple log by drop or choice, shows how far it is, asks what the file leaves open, and says what was read. */
export default function LogImport(given: LogImportProps) {
  const props = useMemo(() => islandProps(logImportPropsSchema, given), [given]);
  const [phase, setPhase] = useState<Phase>({ at: 'waiting' });
  const [problem, setProblem] = useState<string | null>(null);
  const [over, setOver] = useState(false);
  const stop = useRef<AbortController | null>(null);
  const input = useRef<HTMLInputElement>(null);
  const id = useId();

  const settle = (sent: Sent, mapping: Mapping): void =>
    setPhase(
      sent.kind === 'read'
        ? { at: 'read', log: sent.log }
        : { at: 'asked', questions: sent.questions, mapping },
    );
  const fail = (error: unknown): void => {
    setPhase({ at: 'waiting' });
    setProblem(
      error instanceof DOMException && error.name === 'AbortError'
        ? 'Stopped. Nothing of the file was kept.'
        : sentenceFor(error),
    );
  };
  const take = async (file: File): Promise<void> => {
    setProblem(null);
    if (file.size > props.maxBytes) {
      setProblem(
        `This file has ${Math.ceil(file.size / 1048576)} MiB; up to ${Math.floor(props.maxBytes / 1048576)} MiB are taken. Export it at a longer interval, or in parts.`,
      );
      return;
    }
    stop.current = new AbortController();
    setPhase({ at: 'sending', name: file.name, share: 0 });
    const onProgress = (share: number): void =>
      setPhase(share >= 1 ? { at: 'reading', name: file.name } : { at: 'sending', name: file.name, share });
    await sendLog(props.runId, file, onProgress, stop.current.signal).then((sent) => settle(sent, {}), fail);
  };
  const takeChosen = (from: HTMLInputElement): void => {
    const file = from.files?.[0];
    from.value = '';
    if (file) void take(file);
  };
  const takeEarly = useRef(takeChosen);
  // A file may be chosen before the script is there to hear of it.
  useEffect(() => {
    if (input.current?.files?.length) takeEarly.current(input.current);
  }, []);
  const answer = async (answers: Mapping): Promise<void> => {
    if (phase.at !== 'asked') return;
    const mapping = { ...phase.mapping, ...answers };
    setProblem(null);
    setPhase({ at: 'reading', name: 'the kept file' });
    await sendAnswers(props.runId, phase.questions.logId, mapping).then(
      (sent) => settle(sent, mapping),
      (error: unknown) => {
        setPhase(phase);
        setProblem(sentenceFor(error));
      },
    );
  };
  const onDrop = (event: DragEvent): void => {
    event.preventDefault();
    setOver(false);
    const file = event.dataTransfer.files[0];
    if (file) void take(file);
  };
  return (
    <section className="log-import" aria-labelledby={`${id}-title`}>
      <h2 id={`${id}-title`} className="section-title">
        {props.again ? 'Add another log' : 'Thermocouple log'}
      </h2>
      <noscript>
        <p className="notice">
          A log is sent and read step by step by a script, which is switched off in this browser.
        </p>
      </noscript>
      {phase.at === 'waiting' ? (
        <label
          className="log-drop"
          data-over={over || undefined}
          onDragOver={(event) => {
            event.preventDefault();
            setOver(true);
          }}
          onDragLeave={() => setOver(false)}
          onDrop={onDrop}
        >
          <span>Drop the logger’s file here, or choose it.</span>
          <span className="hint">
            CSV or text, in whatever shape the logger writes it. The file itself is kept as it came.
          </span>
          <input
            ref={input}
            className="log-file"
            type="file"
            accept=".csv,.txt,.tsv,.log,.dat,text/csv,text/plain"
            aria-label="Log file"
            onChange={(event) => takeChosen(event.target)}
          />
        </label>
      ) : null}
      {phase.at === 'sending' ? (
        <div className="log-progress">
          <label htmlFor={`${id}-progress`}>Sending {phase.name}</label>
          <progress id={`${id}-progress`} max={1} value={phase.share} />
          <button type="button" className="btn btn-small" onClick={() => stop.current?.abort()}>
            Stop
          </button>
        </div>
      ) : null}
      {phase.at === 'reading' ? (
        <p className="log-progress" role="status">
          Reading {phase.name}, laying it on the plan and looking for deviations.
        </p>
      ) : null}
      {phase.at === 'asked' ? (
        <Questions
          questions={phase.questions.questions}
          timeZone={props.timeZone}
          onAnswer={(answers) => void answer(answers)}
          onCancel={() => setPhase({ at: 'waiting' })}
        />
      ) : null}
      {phase.at === 'read' ? <ImportReportView log={phase.log} /> : null}
      <div role="alert">{problem ? <p className="notice notice-hot">{problem}</p> : null}</div>
    </section>
  );
}
