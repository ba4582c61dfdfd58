import { type ChildProcess, spawn } from 'node:child_process'
import { join } from 'node:path'
import { root } from '../../scripts/lib/places.mjs'
import { until } from '../../scripts/lib/processes.mjs'

const settings = ['DATABASE_URL', 'DATABASE_OWNER_URL', 'S3_ENDPOINT', 'SMTP_URL', 'ANIONARY_URL']

/** One run of a command of ours, seen from outside. */
export class Command {
  output = ''
  readonly ended: Promise<number | null>
  private readonly child: ChildProcess

  constructor(script: string, env: Record<string, string>, args: string[] = []) {
    const inherited = Object.fromEntries(Object.entries(process.env).filter(([name]) => !settings.includes(name)))
    this.child = spawn(process.execPath, [join(root, script), ...args], { cwd: root, env: { ...inherited, ...env }, stdio: ['ignore', 'pipe', 'pipe'] })
    this.child.stdout?.on('data', chunk => this.output += String(chunk))
    this.child.stderr?.on('data', chunk => this.output += String(chunk))
    this.ended = new Promise(done => this.child.once('close', code => done(code)))
  }

  /** Waits for a line of output; a command that ends before it is an error. */
  async prints(text: string): Promise<void> {
    const isOver = () => this.output.includes(text) || this.child.exitCode !== null || this.child.signalCode !== null
    await until(isOver, 60)
    if (!this.output.includes(text)) throw new Error(`the command never printed “${text}” but:\n${this.output}`)
  }

  signal(name: NodeJS.Signals): void {
    this.child.kill(name)
  }

  /** Sends a signal and waits for the end. @returns the exit code */
  end(name: NodeJS.Signals): Promise<number | null> {
    this.signal(name)
    return this.ended
  }
}
