import { type Refusal, type Result, refuse, success } from '../../core/result.js';

/** What the page's requests to the host share. */
export interface Transport {
  readonly token: string | undefined;
  readonly fetch: typeof fetch;
}

export interface HostRequest {
  readonly method: 'GET' | 'PUT' | 'POST' | 'DELETE';
  readonly url: URL;
  readonly body?: unknown;
  readonly headers?: Readonly<Record<string, string>>;
  readonly signal: AbortSignal;
}

/** Headers that every request carries; the token, where the shell gave one. */
export function requestHeaders(transport: Transport): Record<string, string> {
  return transport.token === undefined ? {} : { Authorization: `Bearer ${transport.token}` };
}

/**
 * Sends one request. Any answer outside 200–299 is a refusal with the host's own sentence; so are a host
 * that can't be reached ('unreachable') and a request that was given up ('cancelled').
 */
export async function send(transport: Transport, request: HostRequest): Promise<Result<Response>> {
  const hasBody = request.body !== undefined;
  try {
    const response = await transport.fetch(request.url, {
      method: request.method,
      headers: {
        ...requestHeaders(transport),
        ...(hasBody ? { 'Content-Type': 'application/json' } : {}),
        ...request.headers,
      },
      ...(hasBody ? { body: JSON.stringify(request.body) } : {}),
      signal: request.signal,
      cache: 'no-store',
    });
    if (response.ok) return success(response);
    return { ok: false, refusal: await hostRefusal(response) };
  } catch (error) {
    return failedRequest(error, request.signal);
  }
}

/** The same, and the answer read as JSON. */
export async function sendForJson<T>(
  transport: Transport,
  request: HostRequest,
): Promise<Result<T>> {
  const answer = await send(transport, request);
  if (!answer.ok) return answer;
  try {
    return success((await answer.value.json()) as T);
  } catch (error) {
    return failedRequest(error, request.signal);
  }
}

/** A failed fetch as a refusal. Anything that isn't the network's doing is our mistake and thrown on. */
export function failedRequest(error: unknown, signal: AbortSignal): Result<never> {
  if (signal.aborted) return refuse('cancelled', 'Cancelled.');
  if (error instanceof TypeError || error instanceof DOMException || error instanceof SyntaxError) {
    return refuse(
      'unreachable',
      'The program behind this window does not answer. Close the window and start Diptych again.',
    );
  }
  throw error;
}

async function hostRefusal(response: Response): Promise<Refusal> {
  const fallback = {
    code: response.status === 412 ? 'conflict' : `status-${response.status}`,
    text: `The request was refused (${response.status}).`,
  };
  const type = response.headers.get('Content-Type') ?? '';
  if (!type.includes('application/json')) return fallback;
  const body: unknown = await response.json();
  return isRefusal(body)
    ? { code: response.status === 412 ? 'conflict' : body.code, text: body.text }
    : fallback;
}

function isRefusal(body: unknown): body is Refusal {
  return (
    typeof body === 'object' &&
    body !== null &&
    'code' in body &&
    typeof body.code === 'string' &&
    'text' in body &&
    typeof body.text === 'string'
  );
}
