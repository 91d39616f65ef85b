/** Rotations: a column for each link, as rock fills a log; the two rows in use are ochre. */
import { memo } from 'react';
import { StripTitle } from './Axes';
import { EvidenceColumn } from './EvidenceColumn';
import type { Column } from '../../log/columns';
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
const HEAD_LINE = 13;

export const RotationsStrip = memo(function RotationsStrip({
  layout,
  strip,
  columns,
  subject,
  nameOf,
}: Props) {
  const names = columns.map(({ block }) => nameOf(block));
  const pitch = Math.min(LINK_PITCH, (strip.width - 14) / Math.max(1, columns.length));
  // Neighbouring heads that would run into one another stand on two lines.
  const crowded = names.some(
    (name, i) => i > 0 && ((name.length + (names[i - 1]?.length ?? 0)) * LETTER) / 2 + 4 > pitch,
  );
  return (
    <g transform={`translate(${strip.x} 0)`} role="group" aria-label={`Rotations, ${subject}`}>
      <StripTitle layout={layout} title="Rotations" unit={subject} />
      {columns.map((column, i) => (
        <ColumnOf
          key={column.block}
          layout={layout}
          column={column}
          x={FIRST + i * pitch}
          lift={crowded && i % 2 === 1 ? HEAD_LINE : 0}
          nameOf={nameOf}
        />
      ))}
    </g>
  );
});

function ColumnOf({
  layout,
  column,
  x,
  lift,
  nameOf,
}: {
  layout: LogLayout;
  column: Column;
  x: number;
  /** How far the head stands above its usual line, pixels. */
  lift: number;
  nameOf: Props['nameOf'];
}) {
  const y = (age: number) => yOf(layout, age);
  return (
    <g>
      <text x={x + WIDTH / 2} y={layout.head - 6 - lift} textAnchor="middle" className="t-label fill-ink">
        {nameOf(column.block)}
      </text>
      <EvidenceColumn layout={layout} column={column} x={x} width={WIDTH} words />
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
