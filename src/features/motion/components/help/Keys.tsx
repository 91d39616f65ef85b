/** `?`: every key, from the commands themselves. */
import { ALL_COMMANDS, type Command } from '../../store/commands';
import { open } from '../../store/actions';
import { useBench, useWorkbench } from '../bench';

const GROUPS: readonly { readonly id: Command['group']; readonly title: string }[] = [
  { id: 'age', title: 'Age' },
  { id: 'view', title: 'View' },
  { id: 'selection', title: 'Selection' },
  { id: 'help', title: 'Help' },
];
const ON_GLOBE = [
  ['← ↑ → ↓', 'Turn, with Shift by more'],
  ['Esc', 'Put back a drag under way'],
] as const;

export function Keys() {
  const { store } = useBench();
  const isOpen = useWorkbench((state) => state.open === 'keys');
  if (!isOpen) return null;
  return (
    <section
      aria-label="Keys"
      className="border-frame bg-paper absolute top-0 right-0 z-20 max-h-full w-[340px] max-w-full overflow-auto border-b border-l px-4 py-3"
    >
      <div className="flex items-baseline justify-between">
        <h2 className="t-head">Keys</h2>
        <button
          type="button"
          autoFocus
          className="t-body min-h-6 cursor-pointer underline"
          onClick={() => open(store, null)}
        >
          Close
        </button>
      </div>
      {GROUPS.map(({ id, title }) => (
        <List
          key={id}
          title={title}
          rows={ALL_COMMANDS.filter(({ group }) => group === id).map(({ keys, label }) => [
            keys.join('  '),
            label,
          ])}
        />
      ))}
      <List title="On the globe" rows={ON_GLOBE} />
    </section>
  );
}

function List({ title, rows }: { title: string; rows: readonly (readonly [string, string])[] }) {
  return (
    <>
      <h3 className="t-label text-ink-2 mt-3">{title}</h3>
      <dl>
        {rows.map(([keys, label]) => (
          <div key={label} className="t-body border-rule flex justify-between gap-4 border-b py-1">
            <dt>{label}</dt>
            <dd className="tabular text-ink-2 whitespace-nowrap">{keys}</dd>
          </div>
        ))}
      </dl>
    </>
  );
}
