/** Speed in a frame: steps between rows, never smoothed. */
import { memo } from 'react';
import { ticks as niceTicks } from 'd3-array';
import type { Gap } from '../../log/gaps';
import { yOf, type LogLayout, type Strip } from '../../log/layout';
import type { SpeedStep } from '../../log/series';
import { plotOf, StripAxes, type ValueAxis } from './Axes';
import { GapMarks } from './GapMarks';

interface Props {
  readonly layout: LogLayout;
  readonly strip: Strip;
  readonly steps: readonly SpeedStep[];
  /** "in spin axis". */
  readonly frame: string;
  readonly gaps: readonly Gap[];
  readonly stale: boolean;
}

export function speedAxis(steps: readonly SpeedStep[]): ValueAxis {
  const most = Math.max(10, ...steps.map(({ mm_yr }) => mm_yr)) * 1.12;
  return { from: 0, to: most, ticks: niceTicks(0, most, 3) };
}

export const SpeedStrip = memo(function SpeedStrip({ layout, strip, steps, frame, gaps, stale }: Props) {
  const axis = speedAxis(steps);
  const { x } = plotOf(strip, axis);
  const y = (age: number) => yOf(layout, age);
  return (
    <StripAxes layout={layout} strip={strip} title="Speed" unit="mm/yr" axis={axis}>
      {layout.heading !== 'plain' && (
        <text x={6} y={layout.heading === 'low' ? 37 : 54} className="t-tick fill-ink-2">
          {frame}
        </text>
      )}
      {runsOf(steps).map((run) => {
        const edge = run.map(
          ({ younger, older, mm_yr }) =>
            `V${y(younger).toFixed(2)}H${x(mm_yr).toFixed(2)}V${y(older).toFixed(2)}`,
        );
        const start = `M${x(0)} ${y(run[0]?.younger ?? 0).toFixed(2)}`;
        return (
          <g key={start} className={stale ? 'opacity-50' : undefined}>
            <path d={`${start}${edge.join('')}H${x(0)}Z`} className="fill-ochre-band" />
            <path
              d={`${start}${edge.join('')}`}
              className="stroke-ochre fill-none"
              strokeWidth="1.7"
              strokeLinejoin="miter"
            />
          </g>
        );
      })}
      <GapMarks layout={layout} strip={strip} gaps={gaps} />
    </StripAxes>
  );
});

/** Steps that join, so that ages without a speed stay bare. */
function runsOf(steps: readonly SpeedStep[]): SpeedStep[][] {
  const runs: SpeedStep[][] = [];
  for (const step of steps) {
    const run = runs[runs.length - 1];
    if (run && run[run.length - 1]?.older === step.younger) run.push(step);
    else runs.push([step]);
  }
  return runs;
}
