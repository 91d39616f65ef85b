/** The ruled ground of a strip: its heading, the grid of ages, and a value axis along the top. */
import type { ReactNode } from 'react';
import { number } from '../../format';
import { hundredth, yOf, type LogLayout, type Strip } from '../../log/layout';
import { axisStep } from '../../scene/scene';

export interface ValueAxis {
  /** Values at the left and right end of the plot. */
  readonly from: number;
  readonly to: number;
  readonly ticks: readonly number[];
}

export interface Plot {
  readonly left: number;
  readonly right: number;
  readonly x: (value: number) => number;
}

const PAD = 6;

export function plotOf(strip: Strip, { from, to }: ValueAxis): Plot {
  const left = PAD;
  const right = strip.width - PAD;
  return { left, right, x: (value) => hundredth(left + ((value - from) / (to - from)) * (right - left)) };
}

/** On one line where the headings are low. */
export function StripTitle({ layout, title, unit }: { layout: LogLayout; title: string; unit: ReactNode }) {
  const low = layout.heading === 'low';
  return (
    <text x={6} y={20} className="t-head fill-ink">
      {title}
      <tspan {...(low ? { dx: 8 } : { x: 6, dy: 15 })} className="t-label fill-ink-2 [font-weight:400]">
        {unit}
      </tspan>
    </text>
  );
}

interface Props {
  readonly layout: LogLayout;
  readonly strip: Strip;
  readonly title: string;
  readonly unit: ReactNode;
  readonly axis: ValueAxis | null;
  readonly children?: ReactNode;
}

export function StripAxes({ layout, strip, title, unit, axis, children }: Props) {
  const { top, bottom, oldest, head } = layout;
  const step = axisStep(oldest);
  const plot = axis && plotOf(strip, axis);
  const [left, right] = [plot?.left ?? PAD, plot?.right ?? strip.width - PAD];
  const ages = Array.from({ length: Math.floor(oldest / (step / 2)) + 1 }, (_, i) => (i * step) / 2);
  return (
    <g transform={`translate(${strip.x} 0)`} role="group" aria-label={title}>
      <StripTitle layout={layout} title={title} unit={unit} />
      {ages.map((age) => (
        <line
          key={age}
          x1={left}
          x2={right}
          y1={yOf(layout, age)}
          y2={yOf(layout, age)}
          className={age % (step * 2.5) === 0 ? 'stroke-grid-2' : 'stroke-grid'}
        />
      ))}
      {plot &&
        axis.ticks.map((value) => (
          <g key={value}>
            <line
              x1={plot.x(value)}
              x2={plot.x(value)}
              y1={top}
              y2={bottom}
              className={value === 0 ? 'stroke-grid-2' : 'stroke-grid'}
            />
            <text
              x={plot.x(value)}
              y={head - 6}
              textAnchor={plot.x(value) < 14 ? 'start' : plot.x(value) > strip.width - 14 ? 'end' : 'middle'}
              className="t-tick tabular fill-ink-2"
            >
              {number(value)}
            </text>
          </g>
        ))}
      {children}
    </g>
  );
}

/** Words broken into lines that fit a strip. */
export function linesOf(words: string, strip: Strip): string[] {
  const most = Math.max(8, Math.floor((strip.width - 14) / 5.6));
  const lines: string[] = [];
  for (const word of words.split(' ')) {
    const last = lines[lines.length - 1];
    if (last !== undefined && last.length + word.length < most) lines[lines.length - 1] = `${last} ${word}`;
    else lines.push(word);
  }
  return lines;
}

/** Words in place of a curve, over the grid, on lines that fit the strip. */
export function StripNote({
  layout,
  strip,
  age,
  words,
  more = 0,
}: {
  layout: LogLayout;
  strip: Strip;
  age: number;
  words: string;
  /** Lines that will stand below. */
  more?: number;
}) {
  const lines = linesOf(words, strip);
  const y = Math.min(yOf(layout, age), layout.bottom - (lines.length + more) * 14);
  return (
    <text x={9} y={y} className="t-label halo fill-ink-2">
      {lines.map((line, i) => (
        <tspan key={line} x={9} dy={i === 0 ? 14 : 13}>
          {`${line} `}
        </tspan>
      ))}
    </text>
  );
}
