/**
 * The engine without server and database: one JSON document on standard input, one on standard output.
 * Bad input: exit code 2 and `{"error":{code,message,path}}` on standard error; an error of our own: the same with exit code 1.
 */
import { EngineError } from '#shared/engine/errors'
import { failureOf, internalFailure } from './headless/failure'
import type { Failure } from './headless/failure'
import { members } from './headless/members'
import { sections } from './headless/sections'
import { study } from './headless/study'

const COMMANDS: Record<string, (document: unknown) => unknown> = { sections, members, study }

async function standardInput(): Promise<string> {
  const chunks: Buffer[] = []
  for await (const chunk of process.stdin) chunks.push(chunk as Buffer)
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(chunks))
  } catch {
    throw new EngineError('invalid', 'The document is not valid UTF-8.', '')
  }
}

function refuse({ code, message, path }: Failure, exitCode = 2): void {
  process.stderr.write(`${JSON.stringify({ error: { code, message, path } })}\n`)
  process.exitCode = exitCode
}

async function run(name: string | undefined): Promise<void> {
  const command = name !== undefined && Object.hasOwn(COMMANDS, name) ? COMMANDS[name] : undefined
  if (!command) {
    refuse({ code: 'unknown-command', message: `Say one of: ${Object.keys(COMMANDS).join(', ')}.`, path: '' })
    return
  }
  try {
    const answer = command(JSON.parse(await standardInput()))
    process.stdout.write(`${JSON.stringify(answer)}\n`)
  } catch (error) {
    const failure = failureOf(error)
    if (failure) refuse(failure)
    else refuse(internalFailure(error), 1)
  }
}

// A reader that stops early (`| head`) is no failure of ours.
process.stdout.on('error', () => process.exit(0))
await run(process.argv[2])
