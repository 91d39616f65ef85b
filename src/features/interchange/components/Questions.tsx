import { useState } from 'react';
import type { Answers, Question } from '../contract';

interface Props {
  readonly questions: readonly Question[];
  readonly busy: boolean;
  readonly onAnswer: (answers: Answers) => void;
}

/** What the file leaves open; each answer applies to the whole file, and the preview is read again with it. */
export function Questions({ questions, busy, onAnswer }: Props) {
  const [chosen, setChosen] = useState<Answers>({});
  const ready = questions.every((q) => chosen[q.id] !== undefined);
  return (
    <form
      className="border-ochre bg-ochre-wash border p-4"
      onSubmit={(e) => {
        e.preventDefault();
        onAnswer(chosen);
      }}
    >
      <h3 className="t-head">Open questions</h3>
      {questions.map((q) => (
        <fieldset key={q.id} className="mt-3">
          <legend className="t-answer">{q.ask}</legend>
          {q.examples.length > 0 && <p className="t-body text-ink-2">{q.examples.join('; ')}</p>}
          <div className="mt-1 flex flex-wrap gap-x-6">
            {q.choices.map((choice) => (
              <label key={choice} className="t-body flex min-h-8 items-center gap-2">
                <input
                  type="radio"
                  name={q.id}
                  value={choice}
                  checked={chosen[q.id] === choice}
                  onChange={() => setChosen({ ...chosen, [q.id]: choice })}
                />
                {choice}
              </label>
            ))}
          </div>
        </fieldset>
      ))}
      <button className="button mt-4" disabled={!ready || busy}>
        Read again with these answers
      </button>
    </form>
  );
}
