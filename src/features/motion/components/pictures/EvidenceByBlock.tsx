/** What is known when: a column for each block, filled by evidence between its rows, beside the age column. */
import { EVIDENCE } from '../../../../kernel/rotations/types';
import { columnsOf } from '../../log/columns';
import { hundredth, layoutOf, yOf } from '../../log/layout';
import { blockName } from '../../names';
import { axisStep } from '../../scene/scene';
import { useBench, useWorkbench } from '../bench';
import { EvidenceSwatch } from '../globe/Legend';
import { AgeColumn } from '../log/AgeColumn';
import { EvidenceColumn } from '../log/EvidenceColumn';
import { useSize } from '../use-size';
import { PictureFrame } from './Frame';
import type { PictureProps } from './payload';

const HEAD = 128;
const FIRST = { width: 404, height: 780 };

export default function EvidenceByBlock(props: PictureProps) {
  return (
    <PictureFrame {...props}>
      <Chart />
    </PictureFrame>
  );
}

function Chart() {
  const { scene, model } = useBench();
  const selected = useWorkbench((state) => state.block);
  const [box, { width, height }] = useSize<HTMLDivElement>(FIRST);
  const layout = layoutOf({
    width,
    height,
    oldest: scene.oldest,
    head: HEAD,
    links: 1,
    strips: ['age', 'rotations'],
  });
  const [age, strip] = layout.strips;
  const blocks = scene.blocks
    .filter(({ outlines }) => outlines.length > 0)
    .sort((a, b) => Number(b.code === selected) - Number(a.code === selected));
  const columns = columnsOf(model, blocks.map(({ code }) => ({ block: code, rows: [] }))); // prettier-ignore
  const room = (strip?.width ?? 0) - 14;
  const pitch = room / Math.max(1, blocks.length);
  const bar = Math.min(18, pitch * 0.66);
  const step = axisStep(scene.oldest) / 2;
  const lines = Array.from({ length: Math.floor(scene.oldest / step) + 1 }, (_, i) => i * step);
  return (
    <div className="flex size-full min-h-0 flex-col">
      <div ref={box} className="relative min-h-0 grow overflow-hidden">
        <svg
          width={width}
          height={height}
          viewBox={`0 0 ${width} ${height}`}
          className="absolute inset-0"
          role="img"
          aria-label={summary(blocks, columns)}
        >
          {age && (
            <AgeColumn layout={layout} strip={age} title="What is known when" unit="Evidence by block" />
          )}
          <line x1={0} x2={width} y1={HEAD - 0.5} y2={HEAD - 0.5} className="stroke-frame" />
          <g transform={`translate(${(strip?.x ?? 0) + 6} 0)`}>
            {lines.map((line) => (
              <line
                key={line}
                x1={0}
                x2={room}
                y1={yOf(layout, line)}
                y2={yOf(layout, line)}
                className="stroke-grid"
              />
            ))}
            {columns.map((column, i) => {
              const block = blocks[i];
              const x = hundredth(i * pitch + (pitch - bar) / 2);
              return (
                <g key={column.block}>
                  <text
                    transform={`translate(${hundredth(x + bar / 2 + 4)} ${HEAD - 9}) rotate(-90)`}
                    className={`t-label fill-ink ${column.block === selected ? 'font-semibold' : ''}`}
                  >
                    {block && blockName(block)}
                  </text>
                  <EvidenceColumn layout={layout} column={column} x={x} width={bar} />
                </g>
              );
            })}
          </g>
        </svg>
      </div>
      <ul className="flex flex-wrap gap-x-4 gap-y-1 px-3.5 py-2">
        {EVIDENCE.map((evidence) => (
          <li key={evidence} className="t-label flex items-center gap-1.5">
            <EvidenceSwatch evidence={evidence} />
            {evidence}
          </li>
        ))}
      </ul>
    </div>
  );
}

/** The chart in words: how far back each block's rotations reach, and on what the oldest rests. */
function summary(blocks: readonly { name: string }[], columns: ReturnType<typeof columnsOf>): string {
  const parts = columns.map(({ oldest, fills }, i) => {
    return `${blocks[i]?.name ?? ''}: ${fills.length === 0 ? 'no rotations' : `to ${oldest} Ma, oldest ${fills.at(-1)?.evidence ?? ''}`}`;
  });
  return `Evidence by block. ${parts.join('; ')}.`;
}
