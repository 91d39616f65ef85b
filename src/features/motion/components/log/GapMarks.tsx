/** Ages without a place, marked across a strip; in one strip with why, and a way to the cause. */
import type { Gap } from '../../log/gaps';
import { yOf, type LogLayout, type Strip } from '../../log/layout';
import { select } from '../../store/actions';
import { useBench } from '../bench';
import { linesOf, StripNote } from './Axes';

interface Props {
  readonly layout: LogLayout;
  readonly strip: Strip;
  readonly gaps: readonly Gap[];
  readonly explain?: boolean;
}

export function GapMarks({ layout, strip, gaps, explain = false }: Props) {
  const { store } = useBench();
  return gaps.map(({ younger, older, at, words }) => {
    const [top, bottom] = [yOf(layout, younger), yOf(layout, older)];
    return (
      <g key={younger}>
        <rect x={0} y={top} width={strip.width} height={bottom - top} className="fill-madder-wash" />
        <path d={`M0 ${top}H${strip.width}M0 ${bottom}H${strip.width}`} className="stroke-madder" />
        {explain && (
          <>
            <StripNote layout={layout} strip={strip} age={older} words={words} more={1} />
            <a
              href="#notebook"
              onPointerDown={(event) => event.stopPropagation()}
              onClick={() => select(store, at)}
            >
              <text
                x={9}
                y={
                  Math.min(bottom, layout.bottom - (linesOf(words, strip).length + 1) * 14) +
                  18 +
                  13 * linesOf(words, strip).length
                }
                className="t-label halo fill-kelp underline"
              >
                Open the circuit
              </text>
            </a>
          </>
        )}
      </g>
    );
  });
}
