import type { Changed } from './apply';

type Action = 'edit' | 'import' | 'undo' | 'redo' | 'restore';

/** One transaction of one person on one draft. */
export interface Step {
  readonly revision: number;
  readonly action: Action;
  readonly label: string;
  /** The revision that an undo or redo takes back or does again. */
  readonly reverts_revision: number | null;
}

/** What each person's undo and redo would act on, from that person's own steps in order of revision. */
export function stacks(steps: readonly Step[]): { readonly undo: Step | null; readonly redo: Step | null } {
  const undo: Step[] = [];
  const redo: Step[] = [];
  for (const step of steps) {
    if (step.action === 'undo') move(undo, redo, step);
    else if (step.action === 'redo') move(redo, undo, step);
    else {
      undo.push(step);
      redo.length = 0;
    }
  }
  return { undo: undo.at(-1) ?? null, redo: redo.at(-1) ?? null };
}

function move(from: Step[], to: Step[], { reverts_revision }: Step): void {
  const index = from.findLastIndex(({ revision }) => revision === reverts_revision);
  if (index >= 0) to.push(...from.splice(index, 1));
}

const SINGULAR: Readonly<Record<string, string>> = {
  blocks: 'block',
  outlines: 'outline',
  rotations: 'rotation',
  features: 'feature',
  directions: 'direction',
  sources: 'source',
};

const figure = (value: unknown): string => {
  if (value === null || value === undefined || value === '') return 'blank';
  const text = typeof value === 'string' ? value : JSON.stringify(value);
  return (text.length > 24 ? `${text.slice(0, 23)}…` : text).replace(/^-(?=\d)/, '−');
};

/** How the row is spoken of: "rotation sable 66 Ma". */
function nameOf({ entity, before, after }: Changed): string {
  const row = after ?? before!;
  const name = row['code'] ?? row['site'] ?? row['cite'] ?? row['name'] ?? row['block'] ?? '';
  const parts =
    entity === 'rotations' ? [row['block'], `${String(row['age_ma'])} Ma`] : [name || row['block']];
  return [SINGULAR[entity], ...parts].filter(Boolean).join(' ');
}

/** What an edit did, in a few words: the cell where it was one, the counts where it was many. */
export function labelOf(changes: readonly Changed[]): string {
  const [first] = changes;
  if (first && changes.length === 1) {
    const { before, after } = first;
    if (!before) return `Added ${nameOf(first)}`;
    if (!after) return `Deleted ${nameOf(first)}`;
    const cells = Object.keys(after).filter(
      (name) => JSON.stringify(before[name]) !== JSON.stringify(after[name]),
    );
    const [cell] = cells;
    const what =
      cells.length === 1
        ? `${cell} ${figure(before[cell!])} → ${figure(after[cell!])}`
        : `${cells.length} cells`;
    return `${nameOf({ ...first, after: before })}: ${what}`;
  }
  const counts = new Map<string, number>();
  for (const { entity, before, after } of changes) {
    const verb = before ? (after ? 'changed' : 'deleted') : 'added';
    counts.set(`${entity} ${verb}`, (counts.get(`${entity} ${verb}`) ?? 0) + 1);
  }
  return [...counts]
    .map(
      ([what, n]) => `${n} ${n === 1 ? what.replace(/^\w+/, (entity) => SINGULAR[entity] ?? entity) : what}`,
    )
    .join(', ');
}
