import { useId, useState, type SubmitEvent } from 'react';
import type { LogQuestion, Mapping } from '~/lib/logs/schema';

interface QuestionsProps {
  readonly questions: readonly LogQuestion[];
  readonly timeZone: string;
  readonly onAnswer: (answers: Mapping) => void;
  readonly onCancel: () => void;
}

const ASK: Readonly<Record<LogQuestion['field'], string>> = {
  dateOrder: 'Which part of the date is the day?',
  unit: 'In which unit are the temperatures?',
  interval: 'How many seconds lie between two rows?',
  timeZone: 'In which time zone was the logger’s clock?',
  timeColumn: 'Which column holds the time?',
  controlColumn: 'Which column is the chamber?',
  thermocouple: 'Which type of thermocouple was it?',
  date: 'On which day did the log begin?',
};

/** The questions that a file leaves open, each with what the answer would mean for it. It is kept meanwhile. */
export function Questions({ questions, timeZone, onAnswer, onCancel }: QuestionsProps) {
  const id = useId();
  const [answers, setAnswers] = useState<Readonly<Record<string, string>>>(() =>
    Object.fromEntries(
      questions.map(({ field, guess }) => [
        field,
        guess === null ? (field === 'timeZone' ? timeZone : '') : String(guess),
      ]),
    ),
  );
  const submit = (event: SubmitEvent): void => {
    event.preventDefault();
    const given = questions.map(({ field, choices }) => {
      const text = answers[field] ?? '';
      const chosen = choices.find((choice) => String(choice.value) === text);
      return [field, chosen ? chosen.value : field === 'interval' ? Number(text.replace(',', '.')) : text];
    });
    onAnswer(Object.fromEntries(given) as Mapping);
  };
  const complete = questions.every(({ field }) => (answers[field] ?? '').trim() !== '');
  return (
    <form className="log-questions" onSubmit={submit}>
      <p>This file can be read in more than one way.</p>
      {questions.map(({ field, choices }) => (
        <fieldset key={field}>
          <legend className="label">{ASK[field]}</legend>
          {choices.length > 0 ? (
            choices.map((choice) => (
              <label key={String(choice.value)} className="log-choice">
                <input
                  className="check"
                  type="radio"
                  name={`${id}-${field}`}
                  value={String(choice.value)}
                  checked={answers[field] === String(choice.value)}
                  onChange={(event) => setAnswers((before) => ({ ...before, [field]: event.target.value }))}
                />
                <span>
                  {String(choice.value)} <span className="hint">{choice.example}</span>
                </span>
              </label>
            ))
          ) : (
            <input
              className="input"
              aria-label={ASK[field]}
              type={field === 'date' ? 'date' : 'text'}
              inputMode={field === 'interval' ? 'decimal' : 'text'}
              value={answers[field] ?? ''}
              onChange={(event) => setAnswers((before) => ({ ...before, [field]: event.target.value }))}
            />
          )}
        </fieldset>
      ))}
      <div className="finding-panel-acts">
        <button type="submit" className="btn btn-primary" disabled={!complete}>
          Read it so
        </button>
        <button type="button" className="btn" onClick={onCancel}>
          Choose another file
        </button>
      </div>
    </form>
  );
}
