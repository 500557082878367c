import { vi } from 'vitest';

export type ApiRequest = { method: string; path: string; body: unknown };

type Answer = { status?: number; body?: unknown; headers?: Record<string, string> };

/** A problem detail as RFC 9457 writes it. */
export function problem(
  status: number,
  code: string,
  details: Record<string, unknown> = {},
): Answer {
  return {
    status,
    headers: { 'content-type': 'application/problem+json; charset=utf-8' },
    body: { type: 'about:blank', title: 'x', status, code, details, requestId: 'request-7' },
  };
}

/**
 * Answers fetch() by "METHOD /path"; what is not listed is 404. Returns the requests made.
 * A function is called at each request, so that answers can change.
 */
export function answerApi(answers: Record<string, Answer | (() => Answer)>): ApiRequest[] {
  const requests: ApiRequest[] = [];
  vi.stubGlobal('fetch', (path: string, init: RequestInit) => {
    const method = init.method ?? 'GET';
    const body: unknown = typeof init.body === 'string' ? JSON.parse(init.body) : init.body;
    requests.push({ method, path, body });
    const listed = answers[`${method} ${path}`] ?? problem(404, 'not-found');
    const answer = typeof listed === 'function' ? listed() : listed;
    const { status = 200, headers = { 'content-type': 'application/json' } } = answer;
    const text = answer.body === undefined ? null : JSON.stringify(answer.body);
    return Promise.resolve(new Response(text, { status: text === null ? 204 : status, headers }));
  });
  return requests;
}
