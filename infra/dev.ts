import { type ChildProcess, spawn } from 'node:child_process';
import path from 'node:path';
import { progress } from './bootstrap/progress.cjs';
import { buildServer } from './build/server';
import { angularCli } from './build/web';
import { dataFolder, root, wantedPort } from './paths';
import { endProcess } from './process/alive';
import { portFrom } from './process/ports';
import { writeState } from './process/state-file';
import { greeting } from './stack/greeting';
import { runAtKeyboard } from './stack/session';
import { Stack } from './stack/stack';

const tsx = path.join(root, 'node_modules/tsx/dist/cli.mjs');

function watched(entry: string): readonly [string, ...string[]] {
  const tsconfig = ['--tsconfig', path.join(root, 'tsconfig.base.json')];
  return [process.execPath, tsx, 'watch', '--clear-screen=false', ...tsconfig, entry];
}

/** Angular's own server in front: it reloads the browser, and passes the API on to ours. */
class WebInDevelopment {
  private child: ChildProcess | undefined;

  constructor(
    private readonly port: number,
    private readonly dataDir: string,
  ) {}

  get url(): string {
    return `http://127.0.0.1:${this.port}`;
  }

  start(apiUrl: string): void {
    const proxy = path.join(this.dataDir, 'dev-proxy.json');
    writeState(proxy, { '/api': { target: apiUrl, secure: false } });
    const where = ['--host', '127.0.0.1', '--port', String(this.port), '--proxy-config', proxy];
    this.child = spawn(process.execPath, [angularCli, 'serve', ...where], {
      cwd: root,
      detached: true,
      stdio: ['ignore', 'inherit', 'inherit'],
      env: { ...process.env, NG_CLI_ANALYTICS: 'false' },
    });
  }

  async stop(): Promise<void> {
    if (this.child?.pid && this.child.exitCode === null) await endProcess(this.child.pid);
  }
}

/**
 * `npm run dev`: like `npm start`, with both halves following the sources. The built application
 * is what `npm start` and the tests run; here the strict content policy is not in force.
 */
export async function main(): Promise<void> {
  const dataDir = dataFolder();
  const port = await portFrom(wantedPort());
  const web = new WebInDevelopment(port, dataDir);
  const stack = new Stack({
    dataDir,
    progress,
    demo: true,
    durable: true,
    port: port + 1,
    front: web.url,
    env: { PUBLIC_URL: web.url, NODE_ENV: 'development', LOG_LEVEL: 'info' },
    commands: { web: watched('server/src/main.ts'), worker: watched('server/src/worker.ts') },
    notice: (words) => progress.say(words),
  });
  await runAtKeyboard(stack, async () => {
    await buildServer(progress);
    await stack.start();
    progress.say(greeting(stack.runFile(), dataDir));
    web.start(stack.webUrl);
  }, [web]);
}
