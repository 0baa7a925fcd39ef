import type { ModelPreview, ModelRecord, Problem } from '#contract/api.ts';
import type { ErrorObject } from '#contract/errors.ts';
import type { ModelInput } from '#contract/request.ts';

/** A refusal of the API, or `offline` when no answer came. */
export class ApiError extends Error {
  override readonly name = 'ApiError';
  constructor(
    readonly status: number,
    readonly error: ErrorObject | null,
    message: string,
  ) {
    super(message);
  }
}

export async function call<T>(path: string, method: 'POST' | 'PUT', body: unknown, signal?: AbortSignal): Promise<T> {
  let response: Response;
  try {
    response = await fetch(`/api/v1${path}`, {
      method,
      headers: { 'content-type': 'application/json', accept: 'application/json' },
      body: JSON.stringify(body),
      signal: signal ?? null,
    });
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === 'AbortError') throw cause;
    throw new ApiError(0, null, 'The server does not answer. Your draft is kept on this device.');
  }
  if (response.ok) return (await response.json()) as T;
  const problem = (await response.json().catch(() => null)) as Problem | null;
  throw new ApiError(
    response.status,
    problem?.error ?? null,
    problem?.error?.message ?? `The server answered ${response.status}.`,
  );
}

export const fetchPreview = (input: ModelInput, signal: AbortSignal): Promise<ModelPreview> =>
  call('/models/preview', 'POST', input, signal);

export interface Saving {
  readonly id: string | null;
  readonly revision: number | null;
  readonly title: string;
  readonly description: string;
  readonly input: ModelInput;
}

export const saveModel = ({ id, revision, ...model }: Saving): Promise<ModelRecord> =>
  id === null ? call('/models', 'POST', model) : call(`/models/${id}`, 'PUT', { ...model, revision });
