/** An answer of the school that was not what was asked for, with the sentence it gave. */
class HttpError extends Error {
  constructor(readonly status: number, message: string) {
    super(message);
    this.name = 'HttpError';
  }
}

type Query = Record<string, string | number | undefined>;

/** Reads JSON from one of our own routes. */
export async function getJson<T>(path: string, query: Query = {}): Promise<T> {
  const given = Object.entries(query).filter((entry): entry is [string, string | number] => entry[1] !== undefined);
  const search = new URLSearchParams(given.map(([name, value]) => [name, String(value)]));
  return answered<T>(await fetch(given.length === 0 ? path : `${path}?${search}`, { headers: { Accept: 'application/json' } }));
}

async function answered<T>(response: Response): Promise<T> {
  const body: unknown = await response.json().catch(() => null);
  if (response.ok) return body as T;
  const message = typeof body === 'object' && body !== null && 'message' in body && typeof body.message === 'string' ? body.message : 'The school did not answer as expected.';
  throw new HttpError(response.status, message);
}
