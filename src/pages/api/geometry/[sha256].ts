import { z } from 'zod';
import { readGeometry } from '~/features/ledger/geometry';
import { immutableResponse } from '~/server/etag';
import { route } from '~/server/route';

const query = z.object({ format: z.enum(['binary', 'geojson']).optional() });

export const GET = route(
  {
    action: 'geometry.view',
    summary: 'A geometry by its hash, quantised binary or GeoJSON, for whoever sees a project that uses it',
    query,
    streams: 'application/octet-stream',
  },
  async ({ actor, params, request, query: { format } }) => {
    const { geojson, encoded, shared } = await readGeometry(actor, params['sha256']!);
    const accepted = request.headers.get('accept')?.includes('application/geo+json');
    const asGeojson = format === 'geojson' || (format === undefined && accepted);
    const response = asGeojson
      ? immutableResponse(request, JSON.stringify(geojson), 'application/geo+json', shared)
      : immutableResponse(request, encoded, 'application/octet-stream', shared);
    response.headers.set('Vary', 'Accept');
    return response;
  },
);
