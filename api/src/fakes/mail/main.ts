import { createMailFake } from './mail-fake';

/** The demo mailbox as a process of its own; it goes when it is told to or when its parent goes. */
async function main(): Promise<void> {
  const fake = createMailFake();
  const port = (name: string) => Number(process.env[name] ?? 0);
  const { smtpUrl, httpUrl } = await fake.listen({
    smtpPort: port('MAIL_FAKE_SMTP_PORT'),
    httpPort: port('MAIL_FAKE_HTTP_PORT'),
  });
  process.stdout.write(`mail fake listening on ${smtpUrl} and ${httpUrl}\n`);
  const stop = () => void fake.close().then(() => process.exit(0));
  process.on('SIGTERM', stop);
  process.on('SIGINT', stop);
  process.on('disconnect', stop);
}

void main();
