/** The legend is the control: press a line to turn it off; it stays, grey. */
import { useMemo, type ReactNode } from 'react';
import { EVIDENCE } from '../../../../kernel/rotations/types';
import { toggleLayer } from '../../store/actions';
import type { Drawn, Layer } from '../../store/state';
import { useBench, useCalmAge, useWorkbench } from '../bench';
import { WEAK_DASH } from '../../globe/paint-blocks';
import { ARROW_PX } from '../../globe/paint-marks';
import { weaknessesAt } from '../../scene/weak';
import { useNames } from '../use-names';

const SWATCH = 'h-[14px] w-[26px] shrink-0 overflow-visible';

/** An evidence swatch as blocks, columns, ledger rows and the circuit's bar wear it. */
export function EvidenceSwatch({ evidence }: { readonly evidence: string }) {
  const dashed = evidence === 'unconstrained' ? '4 2.4' : undefined;
  return (
    <svg viewBox="0 0 26 14" className={SWATCH} aria-hidden="true">
      <rect
        x=".5"
        y=".5"
        width="25"
        height="13"
        fill={`url(#ev-${evidence})`}
        className="stroke-ink"
        strokeWidth=".8"
        strokeDasharray={dashed}
      />
    </svg>
  );
}

const MARKS: Readonly<Record<Drawn, ReactNode>> = {
  path: <path d="M0 7h26M5 2.5v9M13 2.5v9M21 2.5v9" className="stroke-ochre" strokeWidth="1.4" />,
  ellipse: <ellipse cx="13" cy="7" rx="9" ry="5.5" className="fill-ochre-band stroke-ochre" />,
  velocity: <path d={`M0 7h${ARROW_PX - 10}m-5-2.5 5 2.5-5 2.5`} className="stroke-ink" fill="none" />,
  separation: <path d="M2 7h22M2 3v8M24 3v8" className="stroke-kelp" strokeWidth="1.3" />,
  coast: <path d="M0 7h26" className="stroke-coast" strokeWidth=".9" strokeDasharray="2.2 1.9" />,
  graticule: (
    <path d="M0 4.5h26M0 9.5h26M6 0v14M13 0v14M20 0v14" className="stroke-rule-2" strokeWidth=".7" />
  ),
  names: <text x="13" y="11" textAnchor="middle" className="t-label fill-ink">Aa</text>, // prettier-ignore
};

const DRAWN: readonly { readonly id: Drawn; readonly label: string }[] = [
  { id: 'path', label: 'drift path' },
  { id: 'ellipse', label: 'ellipse' },
  { id: 'velocity', label: 'velocity' },
  { id: 'separation', label: 'separation' },
  { id: 'coast', label: 'present coast, for location only' },
  { id: 'graticule', label: 'graticule' },
  { id: 'names', label: 'names' },
];

function useCounts(): ReadonlyMap<string, number> {
  const { scene } = useBench();
  const counts = new Map<string, number>();
  for (const { outlines, evidence } of scene.blocks) {
    if (outlines.length > 0) counts.set(evidence, (counts.get(evidence) ?? 0) + 1);
  }
  return counts;
}

function Line({
  layer,
  label,
  detail,
  mark,
}: {
  layer: Layer;
  label: string;
  detail?: string | undefined;
  mark: ReactNode;
}) {
  const { store } = useBench();
  const off = useWorkbench((state) => state.off.has(layer));
  return (
    <button
      type="button"
      aria-pressed={!off}
      onClick={() => toggleLayer(store, layer)}
      className={`t-body border-rule hover:bg-sunk flex min-h-[25px] w-full cursor-pointer items-center gap-2.5 border-b py-0.5 text-left pointer-coarse:min-h-11 ${off ? 'text-ink-3' : 'text-ink'}`}
    >
      <span className={`flex ${off ? 'opacity-40 grayscale' : ''}`}>{mark}</span>
      <span className="grow leading-[17px]">{label}</span>
      <span className="tabular text-ink-2 whitespace-nowrap">{off ? 'off' : detail}</span>
    </button>
  );
}

const Heading = ({ title, unit }: { title: string; unit: string }) => (
  <p className="border-frame flex justify-between border-b pb-1">
    <span className="t-head">{title}</span>
    <span className="t-label text-ink-2 pt-0.5">{unit}</span>
  </p>
);

/** Blocks whose rotation in use says less than it might: their outlines are drawn in dashes and dots. */
function Weak() {
  const { scene, model } = useBench();
  const age = useCalmAge();
  const weak = useMemo(() => {
    const outlined = new Set(scene.blocks.flatMap(({ code, outlines }) => (outlines.length > 0 ? code : [])));
    return model.blocks.flatMap((block) => {
      const lacks = outlined.has(block.code) ? weaknessesAt(block, age) : [];
      return lacks.length > 0 ? [{ code: block.code, lacks }] : [];
    });
  }, [scene, model, age]);
  const nameOf = useNames();
  return (
    <p
      className="t-body border-rule flex min-h-[25px] items-center gap-2.5 border-b py-0.5"
      title={weak.map(({ code, lacks }) => `${nameOf(code)}: ${lacks.join(', ')}`).join('\n')}
    >
      <svg viewBox="0 0 26 14" className={SWATCH} aria-hidden="true">
        <rect
          x=".5"
          y=".5"
          width="25"
          height="13"
          fill="none"
          className="stroke-ink"
          strokeWidth=".8"
          strokeDasharray={WEAK_DASH.join(' ')}
        />
      </svg>
      <span className="grow leading-[17px]">weak at this age</span>
      <span className="tabular text-ink-2">{weak.length}</span>
    </p>
  );
}

export function Legend() {
  const counts = useCounts();
  const step = useWorkbench((state) => state.path.step_ma);
  const details: Partial<Record<Drawn, string>> = {
    path: `${step} Myr`,
    ellipse: '95 %',
    velocity: '100 mm/yr',
    separation: 'km',
    graticule: '15°',
  };
  return (
    <div role="group" aria-label="Legend: what is drawn">
      <Heading title="Evidence" unit="blocks" />
      {EVIDENCE.map((evidence) => (
        <Line
          key={evidence}
          layer={evidence}
          label={evidence}
          detail={String(counts.get(evidence) ?? 0)}
          mark={<EvidenceSwatch evidence={evidence} />}
        />
      ))}
      <Weak />
      <div className="h-3.5" />
      <Heading title="Drawn" unit="on or off" />
      {DRAWN.map(({ id, label }) => (
        <Line
          key={id}
          layer={id}
          label={label}
          detail={details[id]}
          mark={
            <svg viewBox="0 0 26 14" className={SWATCH} fill="none" aria-hidden="true">
              {MARKS[id]}
            </svg>
          }
        />
      ))}
    </div>
  );
}

/** The same lines in a row, below then and now. */
export function LegendRow() {
  const { store } = useBench();
  const off = useWorkbench((state) => state.off);
  const step = useWorkbench((state) => state.path.step_ma);
  const items: { id: Layer; label: string; mark: ReactNode }[] = [
    ...EVIDENCE.map((evidence) => ({
      id: evidence,
      label: evidence,
      mark: <EvidenceSwatch evidence={evidence} />,
    })),
    ...DRAWN.filter(({ id }) => id === 'path' || id === 'coast').map(({ id, label }) => ({
      id,
      label: id === 'path' ? `${label}, ${step} Myr` : label,
      mark: <svg viewBox="0 0 26 14" className={SWATCH} fill="none" aria-hidden="true">{MARKS[id]}</svg>, // prettier-ignore
    })),
  ];
  return (
    <div role="group" aria-label="Legend: what is drawn" className="flex flex-wrap gap-x-5 gap-y-1 px-5 py-2">
      {items.map(({ id, label, mark }) => (
        <button
          key={id}
          type="button"
          aria-pressed={!off.has(id)}
          onClick={() => toggleLayer(store, id)}
          className={`t-body flex min-h-6 cursor-pointer items-center gap-2 hover:underline ${off.has(id) ? 'text-ink-3' : ''}`}
        >
          <span className={`flex ${off.has(id) ? 'opacity-40 grayscale' : ''}`}>{mark}</span>
          {label}
        </button>
      ))}
    </div>
  );
}
