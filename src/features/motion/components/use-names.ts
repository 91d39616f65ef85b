/** Short names by code, for narrow headings. */
import { useMemo } from 'react';
import { useBench } from './bench';

export function useNames(): (code: string) => string {
  const { scene } = useBench();
  return useMemo(() => {
    const names = new Map(scene.blocks.map(({ code, short }) => [code, short]));
    return (code) => names.get(code) ?? code;
  }, [scene.blocks]);
}
