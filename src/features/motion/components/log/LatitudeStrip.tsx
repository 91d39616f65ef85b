/** Latitude: predicted curve with its 95 % band, and what directions give, with unequal errors. */
import { memo } from 'react';
import { ticks as niceTicks } from 'd3-array';
import type { Gap } from '../../log/gaps';
import type { Observed } from '../../log/observed';
import type { LatitudeSample } from '../../log/series';
import { yOf, type LogLayout, type Strip } from '../../log/layout';
import { plotOf, StripAxes, StripNote, type ValueAxis } from './Axes';
import { GapMarks } from './GapMarks';

interface Props {
  readonly layout: LogLayout;
  readonly strip: Strip;
  readonly curve: readonly (readonly LatitudeSample[])[];
  readonly observed: readonly Observed[];
  readonly subject: string;
  /** Oldest placed age and the words for what is beyond. */
  readonly beyond: { readonly age: number; readonly words: string } | null;
  readonly gaps: readonly Gap[];
  /** What to say while the numbers may be out of date; null while they are not. */
  readonly stale: string | null;
}

const PADDING_DEG = 6;

export function latitudeAxis(curve: Props['curve'], observed: Props['observed']): ValueAxis {
  const values = [
    ...curve.flat().flatMap(({ lat, lower, upper }) => [lat, lower ?? lat, upper ?? lat]),
    ...observed.flatMap(({ lower, upper }) => [lower, upper]),
  ];
  const [least, most] = values.length ? [Math.min(...values), Math.max(...values)] : [-60, 60];
  const from = Math.max(-90, least - PADDING_DEG);
  const to = Math.min(90, Math.max(most + PADDING_DEG, from + 20));
  return { from, to, ticks: niceTicks(from, to, 4) };
}

export const LatitudeStrip = memo(function LatitudeStrip({
  layout,
  strip,
  curve,
  observed,
  subject,
  beyond,
  gaps,
  stale,
}: Props) {
  const axis = latitudeAxis(curve, observed);
  const { x } = plotOf(strip, axis);
  const y = (age: number) => yOf(layout, age);
  return (
    <StripAxes layout={layout} strip={strip} title="Latitude" unit={`${subject}, °N`} axis={axis}>
      {layout.heading !== 'plain' && (
        <g transform={`translate(0 ${layout.heading === 'low' ? -15 : 0})`}>
          <Legend observed={observed.length > 0} />
        </g>
      )}
      {curve.map((run, i) => (
        <g key={i} className={stale ? 'opacity-50' : undefined}>
          <path d={band(run, x, y)} className="fill-ochre-band" />
          {edges(run, x, y).map(({ d, atLeast }, k) => (
            <path
              key={k}
              d={d}
              className="stroke-ochre fill-none"
              strokeWidth=".7"
              strokeDasharray={atLeast ? '1 2.2' : undefined}
            />
          ))}
          <path
            d={line(run.map(({ age, lat }) => [x(lat), y(age)]))}
            className="stroke-ochre fill-none"
            strokeWidth="1.7"
          />
        </g>
      ))}
      {observed.map((datum) => (
        <Datum key={datum.id} datum={datum} x={x} y={y} />
      ))}
      <GapMarks layout={layout} strip={strip} gaps={gaps} explain />
      {stale && <StripNote layout={layout} strip={strip} age={layout.oldest / 2} words={stale} />}
      {beyond && beyond.age < layout.oldest && (
        <StripNote layout={layout} strip={strip} age={beyond.age} words={beyond.words} />
      )}
    </StripAxes>
  );
});

type Scale = (value: number) => number;

const n = (value: number): string => value.toFixed(2);
const line = (points: readonly (readonly [number, number])[]): string =>
  points.map(([px, py], i) => `${i === 0 ? 'M' : 'L'}${n(px)} ${n(py)}`).join('');

function band(run: readonly LatitudeSample[], x: Scale, y: Scale): string {
  const upper = run.map(({ age, lat, upper: u }) => [x(u ?? lat), y(age)] as const);
  const lower = run.map(({ age, lat, lower: l }) => [x(l ?? lat), y(age)] as const).reverse();
  return `${line([...upper, ...lower])}Z`;
}

/** The band's two edges, cut where they turn from known to "at least". */
function edges(run: readonly LatitudeSample[], x: Scale, y: Scale): { d: string; atLeast: boolean }[] {
  const parts: LatitudeSample[][] = [];
  for (const sample of run) {
    const part = parts[parts.length - 1];
    if (part && part[0]?.atLeast === sample.atLeast) part.push(sample);
    else {
      if (part) part.push(sample);
      parts.push([sample]);
    }
  }
  return parts.flatMap((part) =>
    (['lower', 'upper'] as const).map((side) => ({
      d: line(part.map((sample) => [x(sample[side] ?? sample.lat), y(sample.age)])),
      atLeast: part[0]?.atLeast ?? false,
    })),
  );
}

function Datum({ datum, x, y }: { datum: Observed; x: Scale; y: Scale }) {
  const { lat, lower, upper, age, ageMin, ageMax, mayBeShallow } = datum;
  const [cx, cy] = [x(lat), y(age)];
  const cap = 2.5;
  const d =
    `M${n(x(lower))} ${n(cy)}H${n(x(upper))}M${n(x(lower))} ${n(cy - cap)}v${2 * cap}M${n(x(upper))} ${n(cy - cap)}v${2 * cap}` +
    `M${n(cx)} ${n(y(ageMin))}V${n(y(ageMax))}`;
  return (
    <g>
      <path d={d} className="stroke-ink fill-none" strokeWidth=".85" />
      <circle
        cx={cx}
        cy={cy}
        r="2.7"
        className={mayBeShallow ? 'fill-paper stroke-ink' : 'fill-ink stroke-paper'}
        strokeWidth={mayBeShallow ? 1.1 : 0.8}
      />
    </g>
  );
}

function Legend({ observed }: { observed: boolean }) {
  return (
    <g aria-hidden="true">
      <rect x={6} y={46} width={16} height={8} className="fill-ochre-band" />
      <line x1={6} x2={22} y1={50} y2={50} className="stroke-ochre" strokeWidth="1.7" />
      <text x={27} y={54} className="t-tick fill-ink-2">
        predicted
      </text>
      {observed && (
        <>
          <path d="M84 50h16M84 47.5v5M100 47.5v5" className="stroke-ink" strokeWidth=".85" />
          <circle cx={92} cy={50} r="2.7" className="fill-ink" />
        </>
      )}
      <text x={observed ? 105 : 84} y={54} className="t-tick fill-ink-2">
        {observed ? 'observed' : 'no directions here'}
      </text>
    </g>
  );
}
