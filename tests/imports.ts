import { existsSync, readFileSync, readdirSync } from 'node:fs'
import path from 'node:path'
import { fileURLToPath } from 'node:url'
import ts from 'typescript'

export const root = fileURLToPath(new URL('..', import.meta.url))

export interface Import {
  /** A path from the root of the project, or the name of a package or built-in. */
  target: string
  /** Erased before it runs. */
  typeOnly: boolean
  /** By import(), once it is wanted. */
  late: boolean
}

/** Source files under a folder, as paths from the root. */
export function sourcesUnder(folder: string): string[] {
  if (!existsSync(path.join(root, folder))) return []
  return readdirSync(path.join(root, folder), { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.(ts|tsx|mjs|js)$/.test(name) && !name.endsWith('.d.ts'))
    .map((name) => path.posix.join(folder, name))
    .sort()
}

export const importsIn = (file: string) => importsOf(file, readFileSync(path.join(root, file), 'utf8'))

export function importsOf(file: string, text: string): Import[] {
  const found: Import[] = []
  const add = (specifier: ts.Node | undefined, typeOnly: boolean, late = false) => {
    if (specifier && ts.isStringLiteralLike(specifier))
      found.push({ target: resolve(file, specifier.text), typeOnly, late })
  }
  const visit = (node: ts.Node): void => {
    if (ts.isImportDeclaration(node)) add(node.moduleSpecifier, node.importClause?.isTypeOnly ?? false)
    if (ts.isExportDeclaration(node)) add(node.moduleSpecifier, node.isTypeOnly)
    if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword)
      add(node.arguments[0], false, true)
    if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)) add(node.argument.literal, true)
    ts.forEachChild(node, visit)
  }
  visit(
    ts.createSourceFile(
      file,
      text,
      ts.ScriptTarget.Latest,
      false,
      file.endsWith('x') ? ts.ScriptKind.TSX : ts.ScriptKind.TS,
    ),
  )
  return found
}

function resolve(file: string, specifier: string): string {
  if (!specifier.startsWith('.')) return specifier
  const target = path.posix.join(path.posix.dirname(file), specifier)
  return [target, `${target}.ts`, `${target}.tsx`].find((name) => existsSync(path.join(root, name))) ?? target
}

/** Everything a file loads when it runs, itself included. */
export function reachOf(file: string, reached = new Set<string>()): Set<string> {
  if (reached.has(file)) return reached
  reached.add(file)
  if (!/\.(ts|tsx|mjs)$/.test(file) || !existsSync(path.join(root, file))) return reached
  for (const { target, typeOnly } of importsIn(file)) if (!typeOnly) reachOf(target, reached)
  return reached
}
