/** The age column: periods and epochs in the chart's colours, its edition named, ages ticked. */
import { CHRONOSTRATIGRAPHIC_CHART, unitsBetween, type GeologicalUnit } from '../../../../kernel/timescale';
import { yOf, type LogLayout, type Strip } from '../../log/layout';
import { axisStep } from '../../scene/scene';

const PERIOD = { x: 38, width: 24 } as const;
const EPOCH = { x: 62, width: 18 } as const;
/** Room a name needs along the column, pixels to a letter. */
const LETTER = 5.1;
/** Ticks to a labelled step. */
const MINOR = 4;
const SHORT: Record<string, string> = { Oligocene: 'Oligo.', Paleocene: 'Paleo.', Pleistocene: 'Pleist.' };

/** "Late Cretaceous" reads "Late" beside its period. */
const epochName = (name: string): string =>
  /^(Late|Middle|Early) /.exec(name)?.[1]?.replace('Middle', 'Mid') ?? name;

interface Props {
  readonly layout: LogLayout;
  readonly strip: Strip;
  readonly title?: string;
  readonly unit?: string;
}

export function AgeColumn({ layout, strip, title = 'Age', unit = 'Ma' }: Props) {
  const { oldest, head, heading } = layout;
  const step = axisStep(oldest);
  const ages = Array.from({ length: Math.floor((oldest / step) * MINOR) + 1 }, (_, i) => (i * step) / MINOR);
  return (
    <g
      transform={`translate(${strip.x} 0)`}
      role="group"
      aria-label={`Age in Ma, ${CHRONOSTRATIGRAPHIC_CHART.edition}`}
    >
      <text x={12} y={20} className="t-head fill-ink">
        {title}
      </text>
      <text x={12} y={35} className="t-label fill-ink-2">
        {unit}
      </text>
      {
        <text
          x={12}
          y={heading === 'plain' ? layout.height - 6 : Math.min(54, head - 8)}
          className="t-tick fill-ink-2"
        >
          {CHRONOSTRATIGRAPHIC_CHART.edition}
        </text>
      }
      {(['period', 'epoch'] as const).map((rank) => (
        <Units
          key={rank}
          layout={layout}
          units={unitsBetween(oldest, 0, rank)}
          {...(rank === 'period' ? PERIOD : EPOCH)}
        />
      ))}
      <line
        x1={PERIOD.x + 0.5}
        x2={PERIOD.x + 0.5}
        y1={yOf(layout, 0)}
        y2={yOf(layout, oldest)}
        className="stroke-frame"
      />
      {ages.map((age) => {
        const y = yOf(layout, age);
        const length = age % step === 0 ? 6 : age % (step / 2) === 0 ? 5 : 3;
        return (
          <g key={age}>
            <line
              x1={PERIOD.x - length}
              x2={PERIOD.x}
              y1={y}
              y2={y}
              className="stroke-ink"
              strokeWidth=".8"
            />
            {age % step === 0 && (
              <text x={PERIOD.x - 9} y={y + 3.8} textAnchor="end" className="t-label tabular fill-ink">
                {age}
              </text>
            )}
          </g>
        );
      })}
    </g>
  );
}

interface UnitsProps {
  readonly layout: LogLayout;
  readonly units: readonly GeologicalUnit[];
  readonly x: number;
  readonly width: number;
}

function Units({ layout, units, x, width }: UnitsProps) {
  return units.map((unit) => {
    const y1 = yOf(layout, unit.younger_ma);
    const y2 = yOf(layout, Math.min(layout.oldest, unit.older_ma));
    const name = unit.rank === 'epoch' ? epochName(unit.name) : unit.name;
    const text = [name, SHORT[name]].find(
      (candidate) => candidate && candidate.length * LETTER + 2 < y2 - y1,
    );
    const ink = unit.name === 'Triassic' ? 'fill-white' : 'fill-[#1C2530]';
    return (
      <g key={unit.name}>
        <rect
          x={x}
          y={y1}
          width={width}
          height={Math.max(0.3, y2 - y1)}
          fill={unit.colour}
          className="stroke-frame"
          strokeWidth=".5"
        />
        {text && (
          <text
            transform={`translate(${x + width / 2 + 3.6} ${(y1 + y2) / 2}) rotate(-90)`}
            textAnchor="middle"
            className={`text-[9.5px] ${ink}`}
          >
            {text}
          </text>
        )}
        <title>{`${unit.name}, ${unit.older_ma} to ${unit.younger_ma} Ma`}</title>
      </g>
    );
  });
}
