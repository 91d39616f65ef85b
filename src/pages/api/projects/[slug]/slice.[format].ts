import { sliceQuery } from '~/features/sheets/contract';
import { drawSlice, SLICE_FORMATS, type SliceFormat } from '~/features/sheets/server';
import { isShared } from '~/features/ledger/state-answer';
import { immutable } from '~/server/etag';
import { sha256 } from '~/server/secrets';
import { Problem } from '~/server/problem';
import { projectRoute } from '~/server/route';

/** An SVG opened by itself may show its fonts and shapes, and run nothing. */
const SVG_POLICY = "default-src 'none'; style-src 'unsafe-inline'; font-src data:; sandbox";

const isFormat = (name: string): name is SliceFormat => Object.hasOwn(SLICE_FORMATS, name);

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'A time slice as SVG, PNG, PDF or GeoJSON',
    query: sliceQuery,
    streams: Object.values(SLICE_FORMATS),
  },
  async ({ access, params, query, request }) => {
    const format = params['format'] ?? '';
    if (!isFormat(format))
      throw new Problem('NotFound', { detail: `Formats are ${Object.keys(SLICE_FORMATS).join(', ')}.` });
    const { body, name } = await drawSlice(access, query, format, request.signal);
    const lasts = typeof query.version === 'number' && query.relative_to !== undefined;
    return new Response(body as BodyInit, {
      headers: {
        'Content-Type': SLICE_FORMATS[format],
        'Content-Disposition': `inline; filename="${name}"`,
        ...(lasts
          ? { 'Cache-Control': immutable(isShared(access)), ETag: `"${sha256(body).slice(0, 32)}"` }
          : { 'Cache-Control': 'private, no-cache' }),
        ...(format === 'svg' ? { 'Content-Security-Policy': SVG_POLICY } : {}),
      },
    });
  },
);
