/** A caller with a cookie jar, behaving as a script does unless told otherwise. */
export class Client {
  readonly cookies = new Map<string, string>();

  constructor(
    readonly url: string,
    private readonly headers: Readonly<Record<string, string>> = {},
  ) {}

  async send(
    method: string,
    path: string,
    body?: unknown,
    headers: Record<string, string> = {},
  ): Promise<Response> {
    const response = await fetch(this.url + path, {
      method,
      redirect: 'manual',
      headers: {
        ...(this.cookies.size > 0 && {
          cookie: [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; '),
        }),
        ...(body !== undefined && { 'content-type': 'application/json' }),
        ...this.headers,
        ...headers,
      },
      body: body === undefined ? undefined : typeof body === 'string' ? body : JSON.stringify(body),
    });
    for (const cookie of response.headers.getSetCookie()) {
      const [, name, value] = /^([^=]+)=([^;]*)/.exec(cookie)!;
      if (value === '') this.cookies.delete(name!);
      else this.cookies.set(name!, value!);
    }
    return response;
  }

  /** Sends and reads the answer's JSON. */
  async json<T = Record<string, unknown>>(
    method: string,
    path: string,
    body?: unknown,
    headers?: Record<string, string>,
  ): Promise<{ status: number; body: T }> {
    const response = await this.send(method, path, body, headers);
    const text = await response.text();
    return { status: response.status, body: (text === '' ? undefined : JSON.parse(text)) as T };
  }

  /** The header Angular's HttpClient adds on writes. */
  tokenHeader(): Record<string, string> {
    return { 'x-xsrf-token': this.cookies.get('XSRF-TOKEN') ?? '' };
  }
}
