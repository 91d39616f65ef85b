/** One block's rotations down the ages: filled by evidence, barred at rows, hatched where there are none. */
import type { Column } from '../../log/columns';
import { yOf, type LogLayout } from '../../log/layout';

interface Props {
  readonly layout: LogLayout;
  readonly column: Column;
  readonly x: number;
  readonly width: number;
  /** Says "none" in the hatching. */
  readonly words?: boolean;
}

export function EvidenceColumn({ layout, column, x, width, words = false }: Props) {
  const y = (age: number) => yOf(layout, age);
  const top = y(0);
  const end = y(column.oldest);
  // Where columns stand close together their bars must not touch.
  // Where no row carries a covariance a ring at each would say nothing more.
  const rings = words || column.bars.some(({ withoutCovariance }) => !withoutCovariance);
  const overhang = words ? 5 : 3;
  return (
    <g>
      {column.fills.map(({ younger, older, evidence }) => (
        <rect
          key={older}
          x={x}
          width={width}
          y={y(younger)}
          height={y(older) - y(younger)}
          fill={`url(#ev-${evidence})`}
          className={evidence === 'unconstrained' ? 'stroke-ink [stroke-dasharray:6_3.2]' : undefined}
          strokeWidth=".5"
        />
      ))}
      {column.oldest < layout.oldest && (
        <g>
          <rect
            x={x - 2}
            width={width + 4}
            y={end + 4}
            height={Math.max(0, layout.bottom - end - 6)}
            fill="url(#ev-outside)"
          />
          {words && layout.bottom - end > 34 && (
            <text
              transform={`translate(${x + width / 2 + 3.6} ${(end + layout.bottom) / 2 + 2}) rotate(-90)`}
              textAnchor="middle"
              className="t-tick halo fill-ink-2"
            >
              none
            </text>
          )}
        </g>
      )}
      <path
        d={`M${x} ${top}V${end}M${x + width} ${top}V${end}M${x} ${top}h${width}`}
        className="stroke-ink fill-none"
        strokeWidth=".8"
      />
      {column.bars.map((bar, i) => {
        const at = y(bar.age);
        const weight = bar.inUse ? 1.9 : bar.handOver ? 1.2 : 1;
        return (
          <g
            key={`${bar.age}-${i}`}
            className={bar.inUse ? 'stroke-ochre' : 'stroke-ink'}
            strokeWidth={weight}
            fill="none"
          >
            {bar.handOver ? (
              <path d={`M${x - 3} ${at - 1.6}h${width + 6}M${x - 3} ${at + 1.6}h${width + 6}`} />
            ) : (
              <path d={`M${x} ${at}h${width + overhang}`} />
            )}
            {bar.withoutCovariance && rings && (
              <circle cx={x + width + 7.5} cy={at} r={2.3} className="fill-paper" />
            )}
          </g>
        );
      })}
    </g>
  );
}
