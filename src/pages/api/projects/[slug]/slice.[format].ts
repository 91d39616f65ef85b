import { sliceQuery } from '~/features/sheets/contract';
import { drawSlice, SLICE_FORMATS, type SliceFormat } from '~/features/sheets/server';
import { immutable } from '~/server/etag';
import { Problem } from '~/server/problem';
import { projectRoute } from '~/server/route';

/** An SVG opened by itself may show its fonts and shapes, and run nothing. */
const SVG_POLICY = "default-src 'none'; style-src 'unsafe-inline'; font-src data:; sandbox";

const isFormat = (name: string): name is SliceFormat => name in SLICE_FORMATS;

export const GET = projectRoute(
  { action: 'compute', summary: 'A time slice as SVG, PNG, PDF or GeoJSON', query: sliceQuery },
  async ({ access, params, query, request }) => {
    const format = params['format'] ?? '';
    if (!isFormat(format))
      throw new Problem('NotFound', { detail: `Formats are ${Object.keys(SLICE_FORMATS).join(', ')}.` });
    const { body, name, state } = await drawSlice(access, query, format, request.signal);
    const lasts = state.sha256 !== null;
    return new Response(body as BodyInit, {
      headers: {
        'Content-Type': SLICE_FORMATS[format],
        'Content-Disposition': `inline; filename="${name}"`,
        'Cache-Control': lasts ? immutable(access.project.visibility === 'public') : 'private, no-cache',
        ...(format === 'svg' ? { 'Content-Security-Policy': SVG_POLICY } : {}),
      },
    });
  },
);
