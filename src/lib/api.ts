/** One field that the server refused, by the JSON Pointer of where it was in the body. */
export type FieldError = { path: string; message: string };

/** A list as the API answers it. */
export type List<Item> = { data: Item[]; nextCursor: string | null };

type ParamValue = string | number | boolean | null | undefined;
export type Params = Record<string, ParamValue | readonly string[]>;

/** An answer other than 2xx, with what the server says went wrong and what to do. */
export class ApiError extends Error {
  override name = 'ApiError';
  constructor(
    readonly status: number,
    readonly title: string,
    readonly detail: string,
    readonly fields: readonly FieldError[] = [],
    /** The id that is in the server's log; only unexpected errors have one. */
    readonly reference: string | null = null,
  ) {
    super(detail || title);
  }
}

let signedOut: () => void = () => undefined;

/** What happens when the session has ended while a page is open. */
export function onSignedOut(listener: () => void): void {
  signedOut = listener;
}

export function apiUrl(path: string, params: Params = {}): string {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(params)) {
    if (Array.isArray(value)) {
      if (value.length > 0) search.set(name, value.join(','));
    } else if (value !== undefined && value !== null && value !== '') {
      search.set(name, String(value));
    }
  }
  const query = search.toString();
  return `/api/v1${path}${query ? `?${query}` : ''}`;
}

export function apiGet<Answer>(path: string, params?: Params, signal?: AbortSignal): Promise<Answer> {
  return call<Answer>(path, apiUrl(path, params), { method: 'GET', ...(signal ? { signal } : {}) });
}

/** Sends JSON, or a form with files as it is. */
export function apiSend<Answer = undefined>(
  method: 'POST' | 'PATCH' | 'PUT' | 'DELETE',
  path: string,
  body?: unknown,
): Promise<Answer> {
  const isForm = body instanceof FormData;
  return call<Answer>(path, apiUrl(path), {
    method,
    ...(body === undefined ? {} : { body: isForm ? body : JSON.stringify(body) }),
    ...(body === undefined || isForm ? {} : { headers: { 'Content-Type': 'application/json' } }),
  });
}

async function call<Answer>(path: string, url: string, init: RequestInit): Promise<Answer> {
  let response: Response;
  try {
    response = await fetch(url, { credentials: 'same-origin', ...init });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw new ApiError(0, 'No answer', 'The server cannot be reached. Check the connection, then try again.');
  }
  if (!response.ok) {
    const problem = await readProblem(response);
    // Signing in answers 401 to a wrong password, and the first look at the session redirects by itself.
    if (response.status === 401 && path !== '/session') signedOut();
    throw problem;
  }
  const text = response.status === 204 ? '' : await response.text();
  return (text ? JSON.parse(text) : undefined) as Answer;
}

async function readProblem(response: Response): Promise<ApiError> {
  const fallback = `The server answered ${response.status}.`;
  try {
    const body = (await response.json()) as {
      title?: string;
      detail?: string;
      errors?: FieldError[];
      instance?: string;
    };
    return new ApiError(
      response.status,
      body.title ?? response.statusText,
      body.detail ?? fallback,
      body.errors ?? [],
      body.instance?.replace(/^urn:uuid:/, '') ?? null,
    );
  } catch {
    return new ApiError(response.status, response.statusText, fallback);
  }
}
