/** Rotations: a column for each link, as rock fills a log; the two rows in use are ochre. */
import { memo } from 'react';
import { StripTitle } from './Axes';
import { type Column } from '../../log/columns';
import { LINK_PITCH, yOf, type LogLayout, type Strip } from '../../log/layout';

interface Props {
  readonly layout: LogLayout;
  readonly strip: Strip;
  readonly columns: readonly Column[];
  readonly subject: string;
  readonly nameOf: (code: string) => string;
}

const WIDTH = 21;
const FIRST = 22;
/** Room that words along a column need, pixels to a letter. */
const LETTER = 5.6;

export const RotationsStrip = memo(function RotationsStrip({
  layout,
  strip,
  columns,
  subject,
  nameOf,
}: Props) {
  const pitch = Math.min(LINK_PITCH, (strip.width - 14) / Math.max(1, columns.length));
  return (
    <g transform={`translate(${strip.x} 0)`} role="group" aria-label={`Rotations, ${subject}`}>
      <StripTitle layout={layout} title="Rotations" unit={subject} />
      {columns.map((column, i) => (
        <ColumnOf key={column.block} layout={layout} column={column} x={FIRST + i * pitch} nameOf={nameOf} />
      ))}
    </g>
  );
});

function ColumnOf({
  layout,
  column,
  x,
  nameOf,
}: {
  layout: LogLayout;
  column: Column;
  x: number;
  nameOf: Props['nameOf'];
}) {
  const y = (age: number) => yOf(layout, age);
  const top = y(0);
  const end = y(column.oldest);
  return (
    <g>
      <text x={x + WIDTH / 2} y={layout.head - 6} textAnchor="middle" className="t-label fill-ink">
        {nameOf(column.block)}
      </text>
      {column.fills.map(({ younger, older, evidence }) => (
        <rect
          key={older}
          x={x}
          width={WIDTH}
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
            width={WIDTH + 4}
            y={end + 4}
            height={Math.max(0, layout.bottom - end - 6)}
            fill="url(#ev-outside)"
          />
          {layout.bottom - end > 34 && (
            <text
              transform={`translate(${x + WIDTH / 2 + 3.6} ${(end + layout.bottom) / 2 + 2}) rotate(-90)`}
              textAnchor="middle"
              className="t-tick halo fill-ink-2"
            >
              none
            </text>
          )}
        </g>
      )}
      <path
        d={`M${x} ${top}V${end}M${x + WIDTH} ${top}V${end}M${x} ${top}h${WIDTH}`}
        className="stroke-ink fill-none"
        strokeWidth=".8"
      />
      {column.bars.map((bar, i) => {
        const at = y(bar.age);
        const width = bar.inUse ? 1.9 : bar.handOver ? 1.2 : 1;
        return (
          <g
            key={`${bar.age}-${i}`}
            className={bar.inUse ? 'stroke-ochre' : 'stroke-ink'}
            strokeWidth={width}
            fill="none"
          >
            {bar.handOver ? (
              <path d={`M${x - 3} ${at - 1.6}h${WIDTH + 6}M${x - 3} ${at + 1.6}h${WIDTH + 6}`} />
            ) : (
              <path d={`M${x} ${at}h${WIDTH + 5}`} />
            )}
            {bar.withoutCovariance && <circle cx={x + WIDTH + 7.5} cy={at} r={2.3} className="fill-paper" />}
          </g>
        );
      })}
      {column.legs.map((leg) => {
        const text = `in ${nameOf(leg.relative_to)}`;
        const room = y(leg.older) - y(leg.younger);
        if (room < text.length * LETTER * 0.8) return null;
        return (
          <text
            key={leg.older}
            transform={`translate(${x - 4.5} ${(y(leg.older) + y(leg.younger)) / 2}) rotate(-90)`}
            textAnchor="middle"
            className="t-tick halo fill-ink-2"
          >
            {text}
          </text>
        );
      })}
    </g>
  );
}
