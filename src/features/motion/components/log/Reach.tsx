/** The age line beyond the log: it runs on over the page to the limb of a globe. */
import { useEffect, useRef, useState } from 'react';
import { baseRadius } from '../../globe/ground-globe';
import { yOf, type LogLayout } from '../../log/layout';
import { useWorkbench } from '../bench';

interface Disc {
  readonly cx: number;
  readonly cy: number;
  readonly radius: number;
}

/** A globe's disc, from the box of its canvas, in coordinates of the log's right top corner. */
function useDisc(id: string, width: number): [React.RefObject<SVGSVGElement | null>, Disc | null] {
  const svg = useRef<SVGSVGElement>(null);
  const [disc, setDisc] = useState<Disc | null>(null);
  useEffect(() => {
    const measure = () => {
      const canvas = document.getElementById(id)?.querySelector('canvas');
      if (!canvas || !svg.current) return setDisc(null);
      const globe = canvas.getBoundingClientRect();
      const own = svg.current.getBoundingClientRect();
      if (globe.left < own.left) return setDisc(null);
      const cx = globe.left + globe.width / 2 - own.left;
      const cy = globe.top + globe.height / 2 - own.top;
      return setDisc({ cx, cy, radius: baseRadius(globe.width, globe.height) + LIMB });
    };
    const observer = new ResizeObserver(measure);
    observer.observe(document.documentElement);
    const target = document.getElementById(id);
    if (target) observer.observe(target);
    // The globe's island may draw itself after this one.
    const drawn = new MutationObserver(measure);
    if (target) drawn.observe(target, { childList: true, subtree: true });
    return () => {
      observer.disconnect();
      drawn.disconnect();
    };
  }, [id, width]);
  return [svg, disc];
}

/** The ring around the disc, CSS pixels. */
const LIMB = 6;
/** Room the words keep from the limb. */
const GAP = 8;

export function Reach({
  layout,
  to,
  hint,
}: {
  readonly layout: LogLayout;
  readonly to: string;
  readonly hint: string;
}) {
  const age = useWorkbench((state) => state.age);
  const [svg, disc] = useDisc(to, layout.width);
  const y = yOf(layout, age);
  const off = disc ? Math.abs(y - disc.cy) : 0;
  // Above and below the globe the line ends where the globe begins.
  const end = disc ? disc.cx - (off < disc.radius ? Math.sqrt(disc.radius ** 2 - off ** 2) : disc.radius) : 0;
  return (
    <svg
      ref={svg}
      width={1}
      height={layout.height}
      className="pointer-events-none absolute top-0 left-full z-10 overflow-visible"
      aria-hidden="true"
    >
      {disc && (
        <>
          <line x1={0} x2={end} y1={y} y2={y} className="stroke-ochre" strokeWidth="1.5" />
          <text x={end - GAP} y={y - 6} textAnchor="end" className="t-label halo fill-ochre-ink">
            {hint}
          </text>
        </>
      )}
    </svg>
  );
}
