import type { SessionDto } from '../../server/contract';

export interface Answered {
  readonly status: number;
  readonly headers: Headers;
  /** Parsed when it is JSON, else text. */
  readonly body: unknown;
}

const JSON_TYPE = /\bjson\b/;

/** One person's browser, as far as the API can tell: keeps cookies and sends the cross-site pair. */
export class Caller {
  readonly cookies = new Map<string, string>();

  constructor(readonly url: string) {}

  /** Sends JSON and reads the answer, whatever its status. */
  async call(
    method: string,
    path: string,
    body?: unknown,
    headers: Record<string, string> = {},
  ): Promise<Answered> {
    const json: Record<string, string> = body === undefined ? {} : { 'Content-Type': 'application/json' };
    return this.#read(
      await this.fetch(path, {
        method,
        headers: { ...json, ...headers },
        body: body === undefined ? undefined : JSON.stringify(body),
      }),
    );
  }

  /** As `call`, for an answer of 2xx; anything else is thrown with its problem. */
  async ok<T>(
    method: string,
    path: string,
    body?: unknown,
    headers: Record<string, string> = {},
  ): Promise<T> {
    const answered = await this.call(method, path, body, headers);
    if (answered.status >= 300)
      throw new Error(
        `${method} ${path} was answered ${String(answered.status)}: ${JSON.stringify(answered.body)}`,
      );
    return answered.body as T;
  }

  get<T>(path: string): Promise<T> {
    return this.ok<T>('GET', path);
  }

  /** Sends one clip as a multipart form. */
  async upload(
    path: string,
    bytes: Uint8Array<ArrayBuffer>,
    name = 'clip.mp4',
    type = 'video/mp4',
    headers: Record<string, string> = {},
  ): Promise<Answered> {
    const form = new FormData();
    form.append('file', new Blob([bytes], { type }), name);
    return this.#read(await this.fetch(path, { method: 'POST', body: form, headers }));
  }

  /** A raw call with this person's cookies and the cross-site header. */
  async fetch(path: string, init: RequestInit = {}): Promise<Response> {
    const method = init.method ?? 'GET';
    if (method !== 'GET' && !this.cookies.has('XSRF-TOKEN')) await this.fetch('/api/dev/nothing');
    const headers = new Headers(init.headers);
    if (this.cookies.size > 0)
      headers.set('Cookie', [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; '));
    const pair = this.cookies.get('XSRF-TOKEN');
    if (method !== 'GET' && pair && !headers.has('X-XSRF-TOKEN')) headers.set('X-XSRF-TOKEN', pair);
    const answer = await fetch(this.url + path, { ...init, headers, redirect: 'manual' });
    for (const cookie of answer.headers.getSetCookie()) this.#keep(cookie);
    return answer;
  }

  signIn(email: string, password: string): Promise<SessionDto> {
    return this.ok<SessionDto>('POST', '/api/auth/sign-in', { email, password });
  }

  #keep(cookie: string): void {
    const [pair = ''] = cookie.split(';');
    const name = pair.slice(0, pair.indexOf('='));
    const value = pair.slice(pair.indexOf('=') + 1);
    const gone = value === '' || /expires=Thu, 01 Jan 1970/i.test(cookie);
    if (gone) this.cookies.delete(name);
    else this.cookies.set(name, value);
  }

  async #read(answer: Response): Promise<Answered> {
    const text = await answer.text();
    const isJson = JSON_TYPE.test(answer.headers.get('content-type') ?? '') && text !== '';
    return {
      status: answer.status,
      headers: answer.headers,
      body: isJson ? (JSON.parse(text) as unknown) : text,
    };
  }
}
