/** Which methods an address of the API takes. */
const METHODS = ['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;
const FILES = import.meta.glob<Record<string, unknown>>('../pages/api/**/*.ts');

/** @param pattern as Astro names a route, `/api/projects/[slug]/blocks`; none where no endpoint has it. */
export async function methodsOf(pattern: string): Promise<readonly string[]> {
  const load = FILES[`../pages${pattern}.ts`] ?? FILES[`../pages${pattern}/index.ts`];
  const endpoint = await load?.();
  if (!endpoint) return [];
  return METHODS.filter((method) => method in endpoint || (method === 'HEAD' && 'GET' in endpoint));
}
