import { z } from 'zod';
import { paths } from '~/paths';
import { settings } from '~/server/env';
import { isSecure } from '~/server/origin';
import { onward, route } from '~/server/route';

const YEAR_S = 365 * 24 * 60 * 60;
const body = z.object({ theme: z.enum(['light', 'dark', 'system']), next: z.string().max(2000).optional() });

export const POST = route(
  {
    action: 'public',
    summary: 'Choose the theme of this browser',
    body,
    status: 204,
    form: () => paths.home,
  },
  ({ context, request, body: { theme, next }, posted }) => {
    const options = {
      path: '/',
      maxAge: YEAR_S,
      sameSite: 'lax' as const,
      secure: isSecure(request, settings()),
    };
    if (theme === 'system') context.cookies.delete('theme', { path: '/' });
    else context.cookies.set('theme', theme, options);
    return posted ? onward(next, paths.home) : undefined;
  },
);
