/** The strips as tables: the same numbers for those who don't see the charts. */
import { useMemo, type ReactNode } from 'react';
import { ageValue, number } from '../../format';
import { columnsOf, usedLinks } from '../../log/columns';
import { observedOn } from '../../log/observed';
import { latitudeCurve, speedSteps } from '../../log/series';
import { rootFrame } from '../../scene/defaults';
import { useBench, useWorkbench } from '../bench';
import { useNames } from '../use-names';

function Table({
  caption,
  heads,
  children,
}: {
  caption: string;
  heads: readonly string[];
  children: ReactNode;
}) {
  return (
    <table className="t-table mb-5 w-full border-collapse">
      <caption className="t-head border-frame border-b pb-1 text-left">{caption}</caption>
      <thead>
        <tr className="border-rule text-ink-2 border-b [&>th]:px-2 [&>th]:py-1 [&>th]:text-right [&>th]:font-normal [&>th:first-child]:pl-0 [&>th:first-child]:text-left">
          {heads.map((head) => (
            <th key={head} scope="col">
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody className="tabular [&_tr]:border-rule [&_td]:px-2 [&_td]:py-0.5 [&_td]:text-right [&_td:first-child]:pl-0 [&_td:first-child]:text-left [&_tr]:border-b">
        {children}
      </tbody>
    </table>
  );
}

export function LogTables() {
  const { scene, model, point } = useBench();
  const code = useWorkbench((state) => state.block);
  const heldStill = useWorkbench((state) => state.heldStill);
  const used = useWorkbench(({ age }) => JSON.stringify(code ? usedLinks(model, code, age, heldStill) : []));
  const nameOf = useNames();
  const frame = rootFrame(model, code);
  const columns = useMemo(
    () => columnsOf(model, JSON.parse(used) as ReturnType<typeof usedLinks>),
    [model, used],
  );
  const curve = useMemo(
    () => (point ? latitudeCurve(model, point, frame).flat() : []),
    [model, point, frame],
  );
  const steps = useMemo(() => (point ? speedSteps(model, point, heldStill) : []), [model, point, heldStill]);
  const observed = code ? observedOn(scene.directions, code) : [];
  const limits = (lower: number | null, upper: number | null) => (
    <>
      <td>{lower === null ? 'not known' : number(lower, 1)}</td>
      <td>{upper === null ? 'not known' : number(upper, 1)}</td>
    </>
  );
  return (
    <div
      className="min-h-0 grow overflow-auto px-3.5 py-3"
      tabIndex={0}
      role="region"
      aria-label="Charts as tables"
    >
      <Table caption="Rotations" heads={['Block', 'Age, Ma', 'Hand-over', 'Covariance', 'In use']}>
        {columns.flatMap(({ block, bars }) =>
          bars.map((bar, i) => (
            <tr key={`${block}-${i}`}>
              <td>{nameOf(block)}</td>
              <td>{ageValue(bar.age)}</td>
              <td>{bar.handOver ? 'yes' : ''}</td>
              <td>{bar.withoutCovariance ? 'none' : 'given'}</td>
              <td>{bar.inUse ? 'yes' : ''}</td>
            </tr>
          )),
        )}
      </Table>
      <Table
        caption={`Predicted latitude in ${nameOf(frame)}, °N`}
        heads={['Age, Ma', 'Latitude', 'from (95 %)', 'to (95 %)', 'Limits']}
      >
        {curve
          .filter(({ age }) => Math.abs(age % 10) < 1e-9)
          .map((sample) => (
            <tr key={sample.age}>
              <td>{ageValue(sample.age)}</td>
              <td>{number(sample.lat, 1)}</td>
              {limits(sample.lower, sample.upper)}
              <td>{sample.atLeast ? 'at least' : ''}</td>
            </tr>
          ))}
      </Table>
      {observed.length > 0 && (
        <Table
          caption="Observed latitude, °N"
          heads={['Site', 'Age, Ma', 'Latitude', 'from (95 %)', 'to (95 %)']}
        >
          {observed.map((datum) => (
            <tr key={datum.id}>
              <td>{datum.site}</td>
              <td>{ageValue(datum.age)}</td>
              <td>{number(datum.lat, 1)}</td>
              {limits(datum.lower, datum.upper)}
            </tr>
          ))}
        </Table>
      )}
      <Table caption={`Speed in ${nameOf(heldStill)}, mm/yr`} heads={['from, Ma', 'to, Ma', 'Speed']}>
        {steps.map(({ younger, older, mm_yr }) => (
          <tr key={older}>
            <td>{ageValue(younger)}</td>
            <td>{ageValue(older)}</td>
            <td>{number(mm_yr, 1)}</td>
          </tr>
        ))}
      </Table>
    </div>
  );
}
