import { withDemo } from './from-environment.ts'

console.log(JSON.stringify(await withDemo(async (demo) => demo)))
