import { randomUUID } from 'node:crypto';
import { appendFile, mkdir, readFile, writeFile } from 'node:fs/promises';
import type { Server } from 'node:http';
import { join } from 'node:path';
import express, { type Express } from 'express';
import { simpleParser, type AddressObject } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import { z } from 'zod';

const messageSchema = z.object({
  id: z.string(),
  messageId: z.string(),
  receivedAt: z.string(),
  to: z.array(z.string()),
  subject: z.string(),
  text: z.string(),
});
export type SinkMessage = z.infer<typeof messageSchema>;

interface SinkSettings {
  readonly smtpPort: number;
  readonly httpPort: number;
  readonly directory: string;
}

function escaped(text: string): string {
  return text.replace(/[&<>"]/g, (character) => `&#${character.charCodeAt(0)};`);
}

function withLinks(text: string): string {
  return escaped(text).replace(/https?:\/\/[^\s<]+/g, (link) => `<a href="${link}">${link}</a>`);
}

function addressesOf(to: AddressObject | AddressObject[] | undefined): string[] {
  const list = to === undefined ? [] : Array.isArray(to) ? to : [to];
  return list.flatMap(({ value }) => value.map(({ address }) => address ?? ''));
}

function readingPage(messages: readonly SinkMessage[]): string {
  const articles = messages.map(
    ({ subject, to, receivedAt, text }) => `<article><h2>${escaped(subject)}</h2>
<p><small>to ${escaped(to.join(', '))} · ${escaped(receivedAt)}</small></p><pre>${withLinks(text)}</pre></article>`,
  );
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>Mail sink</title><style>body{font:16px/1.5 system-ui,sans-serif;max-width:60rem;margin:2rem auto;padding:0 1rem;background:#f7f6f2;color:#1b262c}
pre{white-space:pre-wrap;background:#fff;padding:1rem;border:1px solid #9aa8ae;border-radius:4px}</style></head><body>
<h1>Mail sink: ${messages.length} messages</h1><p>For trials only: mail ends here and goes nowhere.</p>${articles.join('\n')}</body></html>`;
}

class MessageStore {
  readonly #file: string;
  #messages: SinkMessage[] = [];

  constructor(directory: string) {
    this.#file = join(directory, 'messages.jsonl');
  }

  async load(directory: string): Promise<void> {
    await mkdir(directory, { recursive: true });
    await appendFile(this.#file, '');
    const lines = (await readFile(this.#file, 'utf8')).split('\n').filter((line) => line !== '');
    this.#messages = lines.map((line) => messageSchema.parse(JSON.parse(line)));
  }

  newestFirst(): SinkMessage[] {
    return [...this.#messages].reverse();
  }

  async add(message: SinkMessage): Promise<void> {
    await appendFile(this.#file, `${JSON.stringify(message)}\n`);
    this.#messages.push(message);
  }

  async clear(): Promise<void> {
    this.#messages = [];
    await writeFile(this.#file, '');
  }
}

function smtpServer(store: MessageStore): SMTPServer {
  return new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    onData: (stream, _session, done) => {
      simpleParser(stream)
        .then((mail) =>
          store.add({
            id: randomUUID(),
            messageId: mail.messageId ?? '',
            receivedAt: new Date().toISOString(),
            to: addressesOf(mail.to),
            subject: mail.subject ?? '',
            text: mail.text ?? '',
          }),
        )
        .then(() => done(), done);
    },
  });
}

function readingApp(store: MessageStore): Express {
  const app = express();
  app.get('/', (_request, response) => void response.send(readingPage(store.newestFirst())));
  app.get('/messages', (_request, response) => void response.json(store.newestFirst()));
  app.delete('/messages', async (_request, response) => {
    await store.clear();
    response.status(204).end();
  });
  return app;
}

/** Takes mail on loopback, keeps it on disk and shows it on a page and as JSON. For trials and tests only. */
export async function startMailSink(settings: SinkSettings): Promise<{ stop: () => Promise<void> }> {
  const store = new MessageStore(settings.directory);
  await store.load(settings.directory);
  const smtp = smtpServer(store);
  await new Promise<void>((resolve) => smtp.listen(settings.smtpPort, '127.0.0.1', resolve));
  const http = await new Promise<Server>((resolve) => {
    const listening = readingApp(store).listen(settings.httpPort, '127.0.0.1', () => resolve(listening));
  });
  return {
    stop: async () => {
      http.closeAllConnections();
      await new Promise<void>((resolve) => http.close(() => resolve()));
      await new Promise<void>((resolve) => smtp.close(() => resolve()));
    },
  };
}
