import type { APIRoute } from 'astro';
import { safeNext } from '#features/account/next.ts';
import { textOf } from '../_forms.ts';

const YEAR = 365 * 86_400;

/** Remembers the appearance in a cookie and goes back to the page that asked. */
export const POST: APIRoute = async ({ request, cookies, redirect, url }) => {
  const form = await request.formData();
  const theme = textOf(form, 'theme');
  if (theme === 'light' || theme === 'dark')
    cookies.set('theme', theme, {
      path: '/',
      maxAge: YEAR,
      sameSite: 'lax',
      httpOnly: true,
      secure: url.protocol === 'https:',
    });
  else cookies.delete('theme', { path: '/' });
  return redirect(safeNext(form.get('next')), 303);
};
