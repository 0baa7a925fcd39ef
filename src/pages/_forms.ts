import type { APIContext, AstroCookieSetOptions } from 'astro';
import type { ErrorObject } from '#contract/errors.ts';
import type { CookieToSet } from '#server/auth.ts';
import { errorOf, isAnswer, statusOf } from '#server/refusal.ts';

/** The text under one name of a submitted form; a file or nothing is the empty text. */
export function textOf(form: FormData, name: string): string {
  const value = form.get(name);
  return typeof value === 'string' ? value : '';
}

/** A refusal as the error object that the form shows; a defect is thrown on to the error page. */
export function refusalOf(error: unknown): ErrorObject {
  if (!isAnswer(error)) throw error;
  return errorOf(error);
}

export const statusOfRefusal = statusOf;

export function setCookie({ cookies }: Pick<APIContext, 'cookies'>, { name, value, attributes }: CookieToSet): void {
  cookies.set(name, value, attributes as AstroCookieSetOptions);
}

/** A stored time for people: minutes, UTC. */
export const whenOf = (time: string): string => `${time.slice(0, 10)} ${time.slice(11, 16)} UTC`;
