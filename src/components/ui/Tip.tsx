/** A few words that appear beside a control on hover or focus. */
import type { ReactElement } from 'react';
import { Tooltip, TooltipTrigger } from 'react-aria-components';

export function Tip({ children, words }: { readonly children: ReactElement; readonly words: string }) {
  return (
    <TooltipTrigger delay={500}>
      {children}
      <Tooltip offset={4} className="t-label border-frame bg-paper text-ink max-w-64 border px-2 py-1">
        {words}
      </Tooltip>
    </TooltipTrigger>
  );
}
