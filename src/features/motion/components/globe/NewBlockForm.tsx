/** What a block that has just been drawn is called. */
import { useState } from 'react';
import { BLOCK_KINDS, EVIDENCE, type BlockKind, type Evidence } from '../../../../kernel/rotations/types';
import { SLUG_LENGTH, SLUG_PATTERN } from '../../../../slug';
import { toSlug } from '../../../interchange/rules/slug';

export interface NewBlock {
  readonly code: string;
  readonly name: string;
  readonly kind: BlockKind;
  readonly evidence: Evidence;
}

interface Props {
  readonly busy: boolean;
  readonly refused: string | null;
  readonly onKeep: (fields: NewBlock) => void;
  readonly onPutBack: () => void;
}

const FIELD = 'border-edge bg-sheet h-7 w-44 rounded-[3px] border px-1.5';

export function NewBlockForm({ busy, refused, onKeep, onPutBack }: Props) {
  const [name, setName] = useState('');
  const [typed, setTyped] = useState<string | null>(null);
  const [kind, setKind] = useState<BlockKind>('terrane');
  const [evidence, setEvidence] = useState<Evidence>('posed');
  const code = typed ?? toSlug(name);
  return (
    <form
      className="border-frame bg-paper t-body grid gap-2 border p-3"
      aria-label="The new block"
      onSubmit={(event) => {
        event.preventDefault();
        onKeep({ code, name, kind, evidence });
      }}
    >
      <label className="flex items-center justify-between gap-3">
        Name{' '}
        <input
          className={FIELD}
          value={name}
          maxLength={120}
          required
          autoFocus
          onChange={(event) => setName(event.target.value)}
        />
      </label>
      <label className="flex items-center justify-between gap-3">
        Code{' '}
        <input
          className={FIELD}
          value={code}
          maxLength={SLUG_LENGTH}
          required
          pattern={SLUG_PATTERN}
          onChange={(event) => setTyped(event.target.value)}
        />
      </label>
      <label className="flex items-center justify-between gap-3">
        Kind
        <select className={FIELD} value={kind} onChange={(event) => setKind(event.target.value as BlockKind)}>
          {BLOCK_KINDS.filter((one) => one !== 'frame').map((one) => (
            <option key={one}>{one}</option>
          ))}
        </select>
      </label>
      <label className="flex items-center justify-between gap-3">
        Evidence
        <select
          className={FIELD}
          value={evidence}
          onChange={(event) => setEvidence(event.target.value as Evidence)}
        >
          {EVIDENCE.map((one) => (
            <option key={one}>{one}</option>
          ))}
        </select>
      </label>
      {refused && <p className="text-madder">{refused}</p>}
      <div className="flex justify-end gap-2">
        <button type="button" className="button" onClick={onPutBack}>
          Put back
        </button>
        <button className="button button-main" disabled={busy}>
          Keep
        </button>
      </div>
    </form>
  );
}
