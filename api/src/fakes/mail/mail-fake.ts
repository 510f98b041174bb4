import type { AddressInfo } from 'node:net';
import { createHttpSide } from './http-side';
import { keptMail, type KeptMail } from './kept-mail';
import { createRefusals, createSmtpSide, type Mood } from './smtp-side';

export interface MailFake {
  listen(ports: { smtpPort: number; httpPort: number }): Promise<{ smtpUrl: string; httpUrl: string }>;
  /** Newest first; with `to` only what went to that address. */
  messages(to?: string): readonly KeptMail[];
  /** The next `count` mails are refused in this way. */
  reject(mood: Mood, count: number): void;
  clear(): void;
  close(): Promise<void>;
}

const keep = 500;

/** A mailbox on 127.0.0.1: takes mail over SMTP, shows it on a page and as JSON. For demos and tests. */
export function createMailFake(): MailFake {
  let kept: KeptMail[] = [];
  let nextId = 1;
  const refusals = createRefusals();
  const smtp = createSmtpSide(refusals, async (raw, to) => {
    const id = nextId++;
    kept = [await keptMail(id, raw, to), ...kept].sort((a, b) => b.id - a.id).slice(0, keep);
  });
  const box = {
    messages: (to?: string) =>
      to ? kept.filter((mail) => mail.to.some((one) => one.toLowerCase() === to.toLowerCase())) : kept,
    reject: (mood: Mood, count: number) => refusals.reject(mood, count),
    clear: () => {
      kept = [];
    },
  };
  const http = createHttpSide(box);
  return {
    ...box,
    async listen({ smtpPort, httpPort }) {
      await new Promise<void>((done, fail) => {
        smtp.once('error', fail);
        smtp.listen(smtpPort, '127.0.0.1', done);
      });
      await new Promise<void>((done) => http.listen(httpPort, '127.0.0.1', done));
      return {
        smtpUrl: `smtp://127.0.0.1:${portOf(smtp.server)}`,
        httpUrl: `http://127.0.0.1:${portOf(http)}`,
      };
    },
    async close() {
      http.closeAllConnections();
      await Promise.all([
        new Promise<void>((done) => http.close(() => done())),
        new Promise<void>((done) => smtp.close(done)),
      ]);
    },
  };
}

const portOf = (server: { address(): string | AddressInfo | null }) => (server.address() as AddressInfo).port;
