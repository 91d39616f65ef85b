/** The notebook: one sentence, the shares of its uncertainty, the rows, and what rests on them. */
import { Fragment, memo, useDeferredValue, useMemo } from 'react';
import {
  age as ageText,
  ageValue,
  angle,
  coordinates,
  latitude,
  longitude,
  number,
  percents,
} from '../../format';
import { observedOn } from '../../log/observed';
import { answerAt, type Answer, type LinkRow } from '../../notebook/answer';
import { restsOn, type Remark } from '../../notebook/rests';
import { rootFrame } from '../../scene/defaults';
import type { NamedPoint } from '../../scene/points';
import { useBench, useWorkbench } from '../bench';
import { useNames } from '../use-names';
import { CopyAnswer } from './CopyAnswer';

/** Follows the age line a moment behind it, so that the line, strips and globe never wait for words. */
export function useAnswer(): { point: NamedPoint | null; answer: Answer | null; age: number } {
  const { model, point } = useBench();
  const age = useDeferredValue(useWorkbench((state) => state.age));
  const heldStill = useWorkbench((state) => state.heldStill);
  const nameOf = useNames();
  const answer = useMemo(
    () => point && answerAt(model, point, age, heldStill, nameOf),
    [model, point, age, heldStill, nameOf],
  );
  return { point, answer, age };
}

/** "within 298 × 220 km (95 %)", with what is known of it. */
export function Within({ answer }: { answer: Extract<Answer, { placed: true }> }) {
  const { ellipse, rows } = answer;
  if (!ellipse) return <>; how surely is not known: no row in use carries a covariance.</>;
  if (ellipse.semi_major_km < 0.05)
    return <>{rows.length === 0 ? ', where it is held still.' : ', exactly: it is the present.'}</>;
  return (
    <>
      , within {ellipse.at_least ? 'at least ' : ''}
      <span className="whitespace-nowrap">
        {number(ellipse.semi_major_km)} × {number(ellipse.semi_minor_km)} km
      </span>{' '}
      (95 %).
    </>
  );
}

function Sentence() {
  const { point, answer, age } = useAnswer();
  if (!point || !answer)
    return <p className="t-lead text-ink-2 mt-1.5">Select a block to see where it was, and why.</p>;
  const subject = point.subject;
  if (!answer.placed) {
    return (
      <p className="t-lead mt-1.5">
        At {ageText(age)}: {answer.why}
      </p>
    );
  }
  return (
    <p className="t-lead mt-1.5 max-w-[34em]">
      At {ageText(age)} {subject} {point.plural ? 'lie' : 'lies'} at <br className="max-md:hidden" />
      <strong className="font-semibold whitespace-nowrap">{coordinates(answer.lat, answer.lon)}</strong>
      <Within answer={answer} />
    </p>
  );
}

/** Lengths are shares of the variance; a link without a share keeps a sliver so that it can be seen. */
const SharesBar = memo(function SharesBar({ rows, root }: { rows: readonly LinkRow[]; root: string }) {
  const nameOf = useNames();
  const whole = rows.reduce((sum, { share }) => sum + share, 0);
  const widths = rows.map(({ share }) => (whole > 0 ? share / whole : 1 / rows.length));
  const starts = widths.map((_, i) => widths.slice(0, i).reduce((sum, w) => sum + w, 0));
  const parts = percents(widths);
  const pc = (x: number) => `${(100 * x).toFixed(2)}%`;
  return (
    <svg
      width="100%"
      height="52"
      className="mt-2 block overflow-visible"
      role="img"
      aria-label={`Shares of the uncertainty: ${rows.map((row, i) => `${nameOf(row.block)} ${`${parts[i] ?? 0} %`}`).join(', ')}`}
    >
      {rows.map((row, i) => {
        const [start, width] = [starts[i] ?? 0, widths[i] ?? 0];
        return (
          <g key={row.block}>
            <rect
              x={pc(start)}
              width={pc(width)}
              y="17"
              height="14"
              fill={`url(#ev-${row.evidence})`}
              className="stroke-ink"
              strokeWidth=".8"
            />
            <line x1={pc(start)} x2={pc(start)} y1="14" y2="34" className="stroke-ink" strokeWidth="1.2" />
            {width > 0.1 && (
              <text
                x={pc(start)}
                y="10"
                textAnchor={start < 0.02 ? 'start' : 'middle'}
                className="t-label fill-ink font-medium"
              >
                {nameOf(row.block)}
              </text>
            )}
            {width > 0.05 && (
              <text
                x={pc(start + width / 2)}
                y="46"
                textAnchor="middle"
                className="t-label tabular fill-ink-2"
              >
                {whole > 0 ? `${parts[i] ?? 0} %` : 'not known'}
              </text>
            )}
          </g>
        );
      })}
      <line x1="100%" x2="100%" y1="14" y2="34" className="stroke-ink" strokeWidth="1.2" />
      <text x="100%" y="10" textAnchor="end" className="t-label fill-ink font-medium">
        {nameOf(root)}
      </text>
    </svg>
  );
});

const Rows = memo(function Rows({ rows }: { rows: readonly LinkRow[] }) {
  const nameOf = useNames();
  return (
    <table className="t-table mt-1 w-full border-collapse">
      <thead>
        <tr className="border-frame text-ink-2 border-b text-left [&>th]:py-1.5 [&>th]:pr-4 [&>th]:font-normal">
          <th scope="col">Rotation</th>
          <th scope="col" className="text-right">
            Pole
          </th>
          <th scope="col" className="text-right">
            Angle
          </th>
          <th scope="col">Between rows</th>
          <th scope="col">Source</th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Fragment key={row.block}>
            <tr className="[&>td]:pt-1.5 [&>td]:pr-4">
              <td className="whitespace-nowrap">
                {nameOf(row.block)} in {nameOf(row.relative_to)}
              </td>
              <td className="tabular text-right whitespace-nowrap">
                {latitude(row.lat)}, {longitude(row.lon)}
              </td>
              <td className="tabular text-right">{angle(row.angle)}</td>
              <td className="tabular whitespace-nowrap">
                {row.younger === row.older
                  ? `at ${ageText(row.older)}`
                  : `${ageValue(row.younger)} and ${ageText(row.older)}`}
              </td>
              <td className="text-ink-2">{row.sources.join('; ') || 'none given'}</td>
            </tr>
            <tr className="border-rule border-b">
              <td colSpan={5} className="t-label tabular text-ink-2 pb-1.5">
                {row.evidence}
                {row.younger !== row.older && `, ${number(100 * row.fraction)} % of the way to the older row`}
                {row.withoutCovariance && ', no covariance'}; without it {number(row.withoutIt.km)} km off, at{' '}
                {coordinates(row.withoutIt.lat, row.withoutIt.lon)}
              </td>
            </tr>
          </Fragment>
        ))}
      </tbody>
    </table>
  );
});

const SEVERITY: Readonly<Record<Remark['severity'], { label: string; colour: string }>> = {
  note: { label: 'Note', colour: 'text-ink' },
  check: { label: 'Check', colour: 'text-ochre-ink' },
  blocker: { label: 'Blocker', colour: 'text-madder' },
};

function Rests() {
  const { model, point, scene } = useBench();
  const heldStill = useWorkbench((state) => state.heldStill);
  const nameOf = useNames();
  const remarks = useMemo(() => {
    if (!point) return [];
    const observed = observedOn(scene.directions, point.block);
    return restsOn(model, point, heldStill, rootFrame(model, point.block), observed, nameOf);
  }, [model, point, scene.directions, heldStill, nameOf]);
  if (remarks.length === 0) return <p className="t-body text-ink-2 pt-2">Nothing stands out.</p>;
  return (
    <dl>
      {remarks.map(({ severity, words }) => (
        <div
          key={words}
          className="t-body border-rule grid grid-cols-[50px_1fr] border-b py-2 leading-[18px]"
        >
          <dt className={`font-semibold ${SEVERITY[severity].colour}`}>{SEVERITY[severity].label}</dt>
          <dd className="text-ink-2">{words}</dd>
        </div>
      ))}
    </dl>
  );
}

export function Notebook() {
  const { point, answer, age } = useAnswer();
  const heldStill = useWorkbench((state) => state.heldStill);
  const rows = answer?.placed ? answer.rows : [];
  return (
    <section
      aria-label="Notebook"
      id="notebook"
      className="grid h-full min-h-0 grid-cols-[minmax(0,1fr)_250px] max-lg:grid-cols-1"
    >
      <div className="min-h-0 overflow-auto px-5 py-3 max-md:px-3.5">
        <div className="flex flex-wrap items-baseline justify-between gap-x-4">
          <h2 className="t-head">Why is it here?</h2>
          {point && answer?.placed && <CopyAnswer point={point} answer={answer} age={age} />}
        </div>
        <Sentence />
        {rows.length > 0 && (
          <>
            <SharesBar rows={rows} root={heldStill} />
            <div className="overflow-x-auto">
              <Rows rows={rows} />
            </div>
          </>
        )}
      </div>
      <aside
        className="border-rule min-h-0 overflow-auto border-l px-4 py-3 max-lg:border-t max-lg:border-l-0"
        aria-label="What rests on it"
      >
        <h2 className="t-head">What rests on it</h2>
        <Rests />
      </aside>
    </section>
  );
}
