import { openapiDocument } from '~/server/openapi';
import { route } from '~/server/route';

export const GET = route({ action: 'public', summary: 'This API as OpenAPI 3.1' }, () => openapiDocument());
