/** Copies the answer as text: for a report, a spreadsheet, or a script. */
import { useState } from 'react';
import type { Answer } from '../../notebook/answer';
import { COPIES, copyText, type Copy } from '../../notebook/copy';
import type { NamedPoint } from '../../scene/points';
import { useBench, useWorkbench } from '../bench';
import { useNames } from '../use-names';

const SAID_MS = 2500;

interface Props {
  readonly point: NamedPoint;
  readonly answer: Extract<Answer, { placed: true }>;
  readonly age: number;
}

export function CopyAnswer({ point, answer, age }: Props) {
  const { scene } = useBench();
  const heldStill = useWorkbench((state) => state.heldStill);
  const nameOf = useNames();
  const [said, setSaid] = useState<string | null>(null);
  const copy = async (what: Copy): Promise<void> => {
    const from = `${scene.title}, ${window.location.href}`;
    const text = copyText(what, { point, answer, age, heldStill, from, nameOf });
    try {
      await navigator.clipboard.writeText(text);
      setSaid(`The ${what} is copied.`);
    } catch {
      setSaid('This browser does not let pages copy.');
    }
    window.setTimeout(() => setSaid(null), SAID_MS);
  };
  return (
    <p className="t-label text-ink-2 flex flex-wrap items-baseline gap-x-3">
      <span>Copy as</span>
      {COPIES.map((what) => (
        <button key={what} type="button" className="link min-h-6" onClick={() => void copy(what)}>
          {what}
        </button>
      ))}
      <span role="status">{said}</span>
    </p>
  );
}
