/** Evidence patterns for SVG, in user space, so that they never scale or turn. Cells are those of the design tokens. */
export function SvgPatterns() {
  return (
    <svg width="0" height="0" className="absolute" aria-hidden="true" focusable="false">
      <defs>
        <pattern id="ev-published" width="7" height="7" patternUnits="userSpaceOnUse">
          <rect width="7" height="7" className="fill-ev-published" />
          <circle className="ev-dot" cx="1.75" cy="1.75" r=".62" />
          <circle className="ev-dot" cx="5.25" cy="5.25" r=".62" />
        </pattern>
        <pattern
          id="ev-fitted"
          width="5.5"
          height="5.5"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(-45)"
        >
          <rect width="5.5" height="5.5" className="fill-ev-fitted" />
          <path className="ev-line" d="M0 2.75H5.5" />
        </pattern>
        <pattern id="ev-posed" width="9" height="7" patternUnits="userSpaceOnUse">
          <rect width="9" height="7" className="fill-ev-posed" />
          <path className="ev-line" d="M.5 1.75H5M5 5.25H9.5M-4 5.25H.5" />
        </pattern>
        <pattern id="ev-unconstrained" width="11" height="11" patternUnits="userSpaceOnUse">
          <rect width="11" height="11" className="fill-ev-unconstrained" />
          <path className="ev-line" d="M2.75 1.25v3M1.25 2.75h3M8.25 6.75v3M6.75 8.25h3" />
        </pattern>
        <pattern
          id="ev-outside"
          width="6"
          height="6"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <path className="stroke-rule-2 fill-none" strokeWidth=".7" d="M0 3H6" />
        </pattern>
      </defs>
    </svg>
  );
}
