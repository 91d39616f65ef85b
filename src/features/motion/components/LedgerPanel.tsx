/** The rows behind what is selected, with the computed row of this age between its neighbours. Reading only. */
import { toPole } from '../../../kernel/rotations';
import { poseAt } from '../scene/tolerant';
import { type CompiledRow } from '../../../kernel/rotations/types';
import { ageValue, number } from '../format';
import { findSceneBlock } from '../scene/scene';
import { useBench, useWorkbench } from './bench';
import { EvidenceSwatch } from './globe/Legend';
import { useNames } from './use-names';

interface Shown {
  readonly row: CompiledRow | null;
  readonly relative_to: string;
  readonly age: number;
  readonly pole: { readonly pole_lat: number; readonly pole_lon: number; readonly angle_deg: number };
  readonly handOver: boolean;
  readonly inUse: boolean;
}

function useRows(): { rows: readonly Shown[]; count: number } {
  const { model } = useBench();
  const code = useWorkbench((state) => state.block);
  const age = useWorkbench((state) => state.age);
  const block = model.blocks.find((candidate) => candidate.code === code);
  if (!block) return { rows: [], count: 0 };
  const leg = block.legs.find(({ younger_ma, older_ma }) => age >= younger_ma && age <= older_ma);
  const pose = leg && poseAt(model, block.code, age, leg.relative_to);
  const link = pose?.status === 'placed' && pose.links.length === 1 ? pose.links[0] : undefined;
  const used = new Set(link ? [link.younger.id, link.older.id] : []);
  const rows = block.legs.flatMap(({ rows: own, relative_to }, k): Shown[] =>
    own
      .filter(({ implied }) => !implied)
      .map((row, i) => ({
        row,
        relative_to,
        age: row.age_ma,
        pole: row,
        handOver: k > 0 && i === 0,
        inUse: used.has(row.id),
      })),
  );
  const count = rows.length;
  if (link && leg && link.younger.id !== link.older.id) {
    const pole = toPole(link.quaternion, link.older);
    rows.push({ row: null, relative_to: leg.relative_to, age, pole, handOver: false, inUse: false });
  }
  return { rows: rows.sort((a, b) => a.age - b.age), count };
}

const HEADS = [
  ['Age', 'Ma', true],
  ['Relative to', '', false],
  ['Pole lat', '°N', true],
  ['Pole lon', '°E', true],
  ['Angle', '°', true],
  ['Evidence', '', false],
  ['Source', '', false],
] as const;

export function LedgerPanel() {
  const { scene } = useBench();
  const block = findSceneBlock(
    scene,
    useWorkbench((state) => state.block),
  );
  const { rows, count } = useRows();
  const nameOf = useNames();
  return (
    <section aria-label="Ledger" className="flex h-full min-h-0 flex-col">
      <h2 className="t-body border-rule border-b px-3.5 py-2">
        <span className="font-semibold">Rotations</span>{' '}
        <span className="text-ink-2">{block ? `${count} of ${block.short}` : ''}</span>
      </h2>
      <div className="min-h-0 grow overflow-auto" tabIndex={0} role="region" aria-label="Rotations">
        <table className="t-table w-full border-collapse">
          <thead className="bg-paper sticky top-0">
            <tr className="border-frame border-b [&>th]:px-2 [&>th]:py-1.5 [&>th]:font-medium">
              {HEADS.map(([name, unit, numeric]) => (
                <th key={name} scope="col" className={numeric ? 'text-right' : 'text-left'}>
                  {name} <span className="text-ink-2 block font-normal">{unit || '\u00a0'}</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map(({ row, relative_to, age, pole, handOver, inUse }) => (
              <tr
                key={row?.id ?? 'computed'}
                className={`h-[21px] border-b ${handOver ? 'border-t-frame border-t' : ''} border-b-rule ${row ? '' : 'bg-ochre-wash text-ochre-ink'} [&>td]:px-2`}
              >
                <td className={`tabular text-right ${inUse || !row ? 'font-semibold' : ''}`}>
                  {ageValue(age)}
                </td>
                <td className="whitespace-nowrap">{nameOf(relative_to)}</td>
                <td className="tabular text-right">{number(pole.pole_lat, 2)}</td>
                <td className="tabular text-right">{number(pole.pole_lon, 2)}</td>
                <td className="tabular text-right">{number(pole.angle_deg, 2)}</td>
                {row ? (
                  <>
                    <td className="whitespace-nowrap">
                      <span className="inline-flex items-center gap-2">
                        <EvidenceSwatch evidence={row.evidence} />
                        {row.evidence}
                      </span>
                    </td>
                    <td className="text-ink-2 whitespace-nowrap">{row.source}</td>
                  </>
                ) : (
                  <td colSpan={2}>between the rows around it</td>
                )}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </section>
  );
}
