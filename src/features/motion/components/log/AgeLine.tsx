/** The age line: its flag is a slider; the read-outs stand where it crosses the curves. */
import { useRef, useState, type KeyboardEvent, type RefObject } from 'react';
import { unitAt } from '../../../../kernel/timescale';
import { age as ageText, ageValue, latitude, number } from '../../format';
import { yOf, type LogLayout } from '../../log/layout';
import { latitudeAt, speedAt } from '../../log/series';
import { setAge } from '../../store/actions';
import { ageStep } from '../../store/commands';
import { useBench, useWorkbench } from '../bench';
import { plotOf, type ValueAxis } from './Axes';

interface Props {
  readonly layout: LogLayout;
  readonly latitudeFrame: string;
  readonly latitude: ValueAxis | null;
  readonly speed: ValueAxis | null;
  /** Words where the selection has no place at this age. */
  readonly outside: string | null;
  readonly handle: RefObject<SVGGElement | null>;
}

export function AgeLine({
  layout,
  latitudeFrame,
  latitude: latAxis,
  speed: speedAxis,
  outside,
  handle,
}: Props) {
  const { store, model, point, scene } = useBench();
  const age = useWorkbench((state) => state.age);
  const heldStill = useWorkbench((state) => state.heldStill);
  const started = useRef<number | null>(null);
  const [focused, setFocused] = useState(false);
  const y = yOf(layout, age);
  const stage = unitAt(age, 'stage')?.name;

  const onKeyDown = (event: KeyboardEvent) => {
    const to = (next: number) => {
      setAge(store, next, scene.oldest);
      event.preventDefault();
      event.stopPropagation();
    };
    const step = ageStep(event);
    if (event.key === 'ArrowUp' || event.key === 'ArrowLeft') to(age - step);
    else if (event.key === 'ArrowDown' || event.key === 'ArrowRight') to(age + step);
    else if (event.key === 'PageUp') to(age - 10);
    else if (event.key === 'PageDown') to(age + 10);
    else if (event.key === 'Home') to(0);
    else if (event.key === 'End') to(scene.oldest);
    else if (event.key === 'Escape' && started.current !== null) to(started.current);
  };

  const sample = point && latitudeAt(model, point, latitudeFrame, age);
  const mm_yr = point && speedAt(model, point, heldStill, age);
  const lat = strip(layout, 'latitude');
  const speed = strip(layout, 'speed');
  return (
    <g>
      <line x1={0} x2={layout.width} y1={y} y2={y} className="stroke-ochre" strokeWidth="1.5" />
      {lat && latAxis && sample && (
        <g transform={`translate(${lat.x} 0)`}>
          <circle
            cx={plotOf(lat, latAxis).x(sample.lat)}
            cy={y}
            r="4.6"
            className="fill-ochre stroke-paper"
            strokeWidth="1.4"
          />
          <text
            x={lat.width - 9}
            y={y - 5}
            textAnchor="end"
            className="t-tick halo fill-ochre-ink font-semibold"
          >
            {latitude(sample.lat)}
          </text>
        </g>
      )}
      {speed && speedAxis && mm_yr !== null && mm_yr !== undefined && (
        <text x={speed.x + 9} y={y - 5} className="t-tick halo fill-ochre-ink font-semibold">
          {number(mm_yr)}
        </text>
      )}
      {outside && lat && (
        <text x={lat.x + 9} y={y - 5} className="t-label halo fill-ochre-ink">
          {outside}
        </text>
      )}
      <g
        ref={handle}
        role="slider"
        tabIndex={0}
        aria-label="Age"
        aria-orientation="vertical"
        aria-valuemin={0}
        aria-valuemax={scene.oldest}
        aria-valuenow={age}
        aria-valuetext={stage ? `${ageText(age)}, ${stage}` : ageText(age)}
        onKeyDown={onKeyDown}
        onFocus={() => {
          started.current = age;
          setFocused(true);
        }}
        onBlur={() => {
          started.current = null;
          setFocused(false);
        }}
        transform={`translate(0 ${y})`}
        className="cursor-ns-resize outline-none"
      >
        <rect x={-4} y={-22} width={52} height={44} className="fill-transparent" />
        {focused && <path d={flag(3, age)} className="stroke-ochre fill-none" strokeWidth="2" />}
        <path d={flag(0, age)} className="fill-ochre stroke-paper" strokeWidth="1" />
        <text
          x={body(age) - 2}
          y={4.2}
          textAnchor="end"
          className="t-table tabular fill-on-accent font-semibold"
        >
          {ageValue(age)}
        </text>
      </g>
    </g>
  );
}

const strip = (layout: LogLayout, id: string) => layout.strips.find((candidate) => candidate.id === id);

/** Width of the flag without its point: three figures before the point need more. */
const body = (age: number): number => (age >= 99.95 ? 38 : 34);

/** The flag's outline, grown by `g` for the focus ring. */
function flag(g: number, age: number): string {
  const w = body(age);
  return `M${0 - g} ${-9 - g}H${w + g / 2}L${w + 5 + g * 1.6} 0L${w + g / 2} ${9 + g}H${0 - g}Z`;
}
