import { spawn } from 'node:child_process'

export interface ToolResult {
  code: number
  output: string
}

/** Runs a short tool to its end. It starts in `/`, as another user may not be able to enter our own folder. */
export function runTool(
  command: string,
  args: readonly string[],
  env: Record<string, string | undefined> = {},
): Promise<ToolResult> {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, {
      cwd: '/',
      env: { PATH: '/usr/sbin:/usr/bin:/sbin:/bin', NODE_ENV: 'production', ...env },
      stdio: ['ignore', 'pipe', 'pipe'],
    })
    let output = ''
    child.stdout.on('data', (chunk: Buffer) => (output += chunk.toString()))
    child.stderr.on('data', (chunk: Buffer) => (output += chunk.toString()))
    child.once('error', reject)
    child.once('close', (code) => resolve({ code: code ?? 1, output }))
  })
}
