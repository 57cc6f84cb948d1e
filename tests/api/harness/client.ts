import { PUBLIC_URL } from './service.ts'

export interface Answer {
  status: number
  headers: Headers
  text: string
  // eslint-disable-next-line @typescript-eslint/no-explicit-any
  json: any
}

interface Call {
  method?: string
  headers?: Record<string, string>
  /** Sent as it is where it is a text. */
  body?: unknown
}

/** A caller that keeps its cookies, as a browser does. */
export class Client {
  readonly url: string
  cookies = new Map<string, string>()
  constructor(url: string) {
    this.url = url
  }

  async call(path: string, { method, headers = {}, body }: Call = {}): Promise<Answer> {
    const cookie = [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ')
    const text = body === undefined || typeof body === 'string' ? body : JSON.stringify(body)
    const response = await fetch(this.url + path, {
      method: method ?? (text === undefined ? 'GET' : 'POST'),
      headers: {
        origin: PUBLIC_URL,
        ...(cookie ? { cookie } : {}),
        ...(text === undefined ? {} : { 'content-type': 'application/json' }),
        ...headers,
      },
      ...(text === undefined ? {} : { body: text }),
    })
    for (const set of response.headers.getSetCookie()) {
      const [, name = '', value = ''] = /^([^=]+)=([^;]*)/.exec(set) ?? []
      this.cookies.set(name, value)
    }
    const answered = await response.text()
    const isJson = /[/+]json/.test(response.headers.get('content-type') ?? '')
    return {
      status: response.status,
      headers: response.headers,
      text: answered,
      json: isJson ? JSON.parse(answered) : undefined,
    }
  }

  post(path: string, body?: unknown, headers: Record<string, string> = {}): Promise<Answer> {
    return this.call(path, { method: 'POST', body, headers })
  }

  solve(caseId: string, key: string, body: unknown): Promise<Answer> {
    return this.post(`/v1/cases/${caseId}/solve`, body, { authorization: `Bearer ${key}` })
  }
}
