import { jsonText } from '../components/json-text.ts'
import type { Body } from './body.ts'

export interface Snippet {
  name: string
  language: 'shellscript' | 'typescript' | 'python' | 'csharp'
  write(url: string, body: Body): string
}

const quoted = (text: string): string => text.replaceAll("'", `'\\''`)
const indented = (text: string): string => text.replaceAll('\n', '\n  ')
/** JSON without the quotes that would end a text of Python around it. */
const unquoted = (text: string): string => text.replaceAll("'", '\\u0027')

/** The same call in each language, with nothing but what comes with it. */
export const snippets: readonly [Snippet, ...Snippet[]] = [
  {
    name: 'curl',
    language: 'shellscript',
    write: (url, body) =>
      [
        `curl "${url}" \\`,
        '  -H "Authorization: Bearer $SOAK_KEY" \\',
        '  -H "Content-Type: application/json" \\',
        `  -d '${quoted(jsonText(body))}'`,
      ].join('\n'),
  },
  {
    name: 'TypeScript',
    language: 'typescript',
    write: (url, body) =>
      [
        `const response = await fetch('${url}', {`,
        "  method: 'POST',",
        '  headers: {',
        '    Authorization: `Bearer ${process.env.SOAK_KEY}`,',
        "    'Content-Type': 'application/json',",
        '  },',
        `  body: JSON.stringify(${indented(jsonText(body))}),`,
        '})',
        'const answer = await response.json()',
        'if (!response.ok) throw new Error(`${answer.code}: ${answer.detail}`)',
        'console.log(JSON.stringify(answer.result))',
      ].join('\n'),
  },
  {
    name: 'Python',
    language: 'python',
    write: (url, body) =>
      [
        'import json',
        'import os',
        'import urllib.error',
        'import urllib.request',
        '',
        `body = r'''${unquoted(jsonText(body))}'''`,
        'request = urllib.request.Request(',
        `    "${url}",`,
        '    data=body.encode(),',
        '    headers={',
        '        "Authorization": "Bearer " + os.environ["SOAK_KEY"],',
        '        "Content-Type": "application/json",',
        '    },',
        ')',
        'try:',
        '    with urllib.request.urlopen(request) as response:',
        '        answer = json.load(response)',
        'except urllib.error.HTTPError as error:',
        '    problem = json.load(error)',
        '    raise SystemExit(problem["code"] + ": " + problem["detail"])',
        'print(json.dumps(answer["result"]))',
      ].join('\n'),
  },
  {
    name: 'C#',
    language: 'csharp',
    write: (url, body) =>
      [
        'using System.Net.Http.Headers;',
        'using System.Text;',
        'using System.Text.Json;',
        '',
        'var body = """',
        jsonText(body),
        '""";',
        'using var client = new HttpClient();',
        'client.DefaultRequestHeaders.Authorization =',
        '    new AuthenticationHeaderValue("Bearer", Environment.GetEnvironmentVariable("SOAK_KEY"));',
        'using var content = new StringContent(body, Encoding.UTF8, "application/json");',
        `using var response = await client.PostAsync("${url}", content);`,
        'using var answer = JsonDocument.Parse(await response.Content.ReadAsStringAsync());',
        'var root = answer.RootElement;',
        'if (!response.IsSuccessStatusCode)',
        '    throw new Exception(root.GetProperty("code") + ": " + root.GetProperty("detail"));',
        'Console.WriteLine(root.GetProperty("result"));',
      ].join('\n'),
  },
]
