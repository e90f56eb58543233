import supertest, { type Response, type Test } from 'supertest';
import type TestAgent from 'supertest/lib/agent.js';
import type { ApiServer } from './api-server.ts';

export const PASSWORD = 'orchards under snow';

type Unsafe = 'post' | 'put' | 'patch' | 'delete';

/** A browser as far as the API sees one: keeps cookies and sends the session's token. */
export class ApiClient {
  readonly agent: TestAgent;
  csrfToken = '';

  constructor(server: Pick<ApiServer, 'server'>) {
    this.agent = supertest.agent(server.server);
  }

  /** Opens a session as nobody. */
  async open(): Promise<this> {
    const response = await this.agent.get('/api/v1/session');
    this.csrfToken = String(response.body.csrfToken);
    return this;
  }

  async signIn(email: string, password = PASSWORD): Promise<Response> {
    await this.open();
    const response = await this.post('/api/v1/session', { email, password });
    if (response.status === 200) this.csrfToken = String(response.body.csrfToken);
    return response;
  }

  get(path: string): Test {
    return this.agent.get(path);
  }

  post(path: string, body?: object): Test {
    return this.send('post', path, body);
  }

  put(path: string, body?: object): Test {
    return this.send('put', path, body);
  }

  patch(path: string, body?: object): Test {
    return this.send('patch', path, body);
  }

  delete(path: string): Test {
    return this.send('delete', path);
  }

  send(method: Unsafe, path: string, body?: object): Test {
    const request = this.agent[method](path).set('X-CSRF-Token', this.csrfToken);
    return body === undefined ? request : request.send(body);
  }

  /** Sends text as a JSON body, for what `JSON.stringify` does not write. */
  raw(method: Unsafe, path: string, text: string): Test {
    return this.send(method, path).set('Content-Type', 'application/json').send(text);
  }

  /** Value of a cookie set by an answer; undefined when it sets none of that name. */
  static cookie(response: Response, name: string): string | undefined {
    const header: unknown = response.headers['set-cookie'];
    const cookies: string[] = Array.isArray(header) ? header.map(String) : [];
    return cookies.find((cookie) => cookie.startsWith(`${name}=`));
  }
}
