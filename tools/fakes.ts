import { fork, type ChildProcess } from 'node:child_process';
import type { Environment } from './environment';

export interface Fakes {
  readonly forecastUrl: string;
  readonly smtpUrl: string;
  readonly mailboxUrl: string;
  stop(): void;
}

/** Starts the forecast and mail stand-ins as processes of their own, on `firstPort` and the two after it (0: free ones). */
export async function startFakes(env: Environment, firstPort: number): Promise<Fakes> {
  const port = (offset: number) => String(firstPort === 0 ? 0 : firstPort + offset);
  const forecast = start('dist/fakes/forecast.mjs', {
    ...env,
    FORECAST_FAKE_PORT: port(0),
  });
  const mail = start('dist/fakes/mail.mjs', {
    ...env,
    MAIL_FAKE_SMTP_PORT: port(1),
    MAIL_FAKE_HTTP_PORT: port(2),
  });
  const stop = () => [forecast, mail].forEach(({ child }) => child.kill('SIGTERM'));
  try {
    const [forecastLine, mailLine] = await Promise.all([forecast.firstLine, mail.firstLine]);
    return {
      forecastUrl: find(forecastLine, /http:\S+/),
      smtpUrl: find(mailLine, /smtp:\S+/),
      mailboxUrl: find(mailLine, /http:\S+/),
      stop,
    };
  } catch (error) {
    stop();
    throw error;
  }
}

function start(file: string, env: Environment): { child: ChildProcess; firstLine: Promise<string> } {
  const child = fork(file, { env, stdio: ['ignore', 'pipe', 'inherit', 'ipc'] });
  const firstLine = new Promise<string>((done, fail) => {
    let text = '';
    child.stdout?.on('data', (chunk: Buffer) => {
      text += chunk.toString();
      if (text.includes('\n')) done(text.split('\n')[0] ?? '');
    });
    child.on('exit', (code) => fail(new Error(`${file} ended with ${code} before it listened.`)));
  });
  return { child, firstLine };
}

function find(line: string, pattern: RegExp): string {
  const match = pattern.exec(line);
  if (!match) throw new Error(`A fake said something unexpected: ${line}`);
  return match[0];
}
