import { setTimeout as pause } from 'node:timers/promises';

/** A signed-in person without a browser: follows redirects and keeps cookies for each site, as a browser does. */
export class PersonSession {
  readonly #url: string;
  readonly #cookies = new Map<string, Map<string, string>>();
  csrfToken = '';

  constructor(url: string) {
    this.#url = url;
  }

  #jar(url: URL): Map<string, string> {
    // Cookies do not tell ports apart, but the provider's and the product's must not meet here.
    const jar = this.#cookies.get(url.host) ?? new Map<string, string>();
    this.#cookies.set(url.host, jar);
    return jar;
  }

  /** One request with the cookies of its site; redirects are answered, not followed. */
  async send(address: string | URL, options: RequestInit = {}): Promise<Response> {
    const url = new URL(address, this.#url);
    const jar = this.#jar(url);
    const headers = new Headers(options.headers);
    if (jar.size > 0) headers.set('cookie', [...jar].map(([name, value]) => `${name}=${value}`).join('; '));
    const response = await fetch(url, { ...options, headers, redirect: 'manual' });
    for (const line of response.headers.getSetCookie()) {
      const [pair = ''] = line.split(';');
      const separator = pair.indexOf('=');
      const [name, value] = [pair.slice(0, separator), pair.slice(separator + 1)];
      if (value === '' || /expires=thu, 01 jan 1970/i.test(line)) jar.delete(name);
      else jar.set(name, value);
    }
    return response;
  }

  cookieOf(site: string, name: string): string | undefined {
    return this.#jar(new URL(site)).get(name);
  }

  setCookie(site: string, name: string, value: string): void {
    this.#jar(new URL(site)).set(name, value);
  }

  /** Follows redirects from an address until a page answers; returns the page and where it is. */
  async follow(address: string | URL, options: RequestInit = {}): Promise<{ response: Response; url: URL }> {
    let url = new URL(address, this.#url);
    let response = await this.send(url, options);
    for (let hop = 0; hop < 12 && response.status >= 300 && response.status < 400; hop += 1) {
      url = new URL(response.headers.get('location') ?? '/', url);
      response = await this.send(url);
    }
    return { response, url };
  }

  /** Goes to the provider and stops at its page of people. */
  async openProvider(returnTo = '/'): Promise<URL> {
    const { url } = await this.follow(`/auth/sign-in?returnTo=${encodeURIComponent(returnTo)}`);
    return url;
  }

  /** Signs in as a demo person; returns where the product lands. */
  async signIn(sub: string, returnTo = '/'): Promise<URL> {
    const provider = await this.openProvider(returnTo);
    const { url } = await this.follow(`${provider.href}/person`, {
      method: 'POST',
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
      body: new URLSearchParams({ sub }).toString(),
    });
    const session = await this.send('/api/v1/session');
    if (session.ok) {
      const body: unknown = await session.json();
      this.csrfToken = typeof body === 'object' && body !== null ? String(Reflect.get(body, 'csrfToken')) : '';
    }
    return url;
  }

  /** A call to the API with the token of the session; JSON in, status and JSON out. */
  async call(method: string, path: string, options: { body?: unknown; headers?: Record<string, string> } = {}) {
    const response = await this.send(`/api/v1${path}`, {
      method,
      headers: {
        ...(method === 'GET' ? {} : { 'x-csrf-token': this.csrfToken }),
        ...(options.body === undefined ? {} : { 'content-type': 'application/json' }),
        ...options.headers,
      },
      ...(options.body === undefined
        ? {}
        : { body: typeof options.body === 'string' ? options.body : JSON.stringify(options.body) }),
    });
    const text = await response.text();
    const isJson = /json/.test(response.headers.get('content-type') ?? '');
    const body: unknown = isJson && text !== '' ? JSON.parse(text) : text;
    return { status: response.status, body, headers: response.headers };
  }

  async get(path: string) {
    return this.call('GET', path);
  }
}

/** Waits until a condition holds; fails with its last value when it does not in time. */
export async function until<T>(read: () => Promise<T>, isThere: (value: T) => boolean, withinMs = 20_000): Promise<T> {
  const end = Date.now() + withinMs;
  let value = await read();
  while (!isThere(value)) {
    if (Date.now() > end)
      throw new Error(`not reached within ${withinMs} ms; last: ${JSON.stringify(value)?.slice(0, 400)}`);
    await pause(50);
    value = await read();
  }
  return value;
}
