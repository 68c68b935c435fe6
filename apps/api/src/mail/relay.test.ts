import { describe, expect, it } from 'vitest';
import { MINUTE, SECOND } from '../clock.ts';
import { createTestApp, type TestApp } from '../testing/test-app.ts';
import { enqueueMail } from './outbox.ts';
import { sendDueMails } from './relay.ts';
import { composeMail } from './templates/layout.ts';

const content = composeMail({ subject: 'A part waits', to: 'Ada', paragraphs: ['Something waits for you.'] });

async function withMails(count: number): Promise<TestApp> {
  const app = await createTestApp();
  for (let at = 0; at < count; at += 1) {
    await app.db.writeTransaction((manager) => {
      const recipient = `person-${at}@works.example`;
      enqueueMail(manager, app.clock.now(), { kind: 'test', recipient, ...content });
      return Promise.resolve();
    });
    app.clock.advance(1);
  }
  return app;
}

const relay = (app: TestApp) => sendDueMails({ ...app, log: app.core.log });
const answered = (responseCode: number) => Object.assign(new Error('no'), { responseCode });

describe('the mail relay', () => {
  it('sends each mail once, oldest first, one person a mail', async () => {
    const app = await withMails(3);
    await relay(app);
    await relay(app);
    expect(app.transport.sent.map((mail) => mail.to)).toEqual(
      [0, 1, 2].map((at) => `person-${at}@works.example`),
    );
    expect(new Set(app.transport.sent.map((mail) => mail.messageId)).size).toBe(3);
  });

  it('waits for a server that is out of reach, loses nothing and keeps the order', async () => {
    const app = await withMails(3);
    app.transport.fault = Object.assign(new Error('refused'), { code: 'ECONNREFUSED' });
    for (let minute = 0; minute < 60; minute += 1) {
      await relay(app);
      app.clock.advance(MINUTE);
    }
    app.transport.fault = undefined;
    await relay(app);
    expect(app.transport.sent.map((mail) => mail.to)).toEqual(
      [0, 1, 2].map((at) => `person-${at}@works.example`),
    );
  });

  it('sends again under the same number when it stopped between the server and its own note', async () => {
    const app = await withMails(1);
    await app.db.writeTransaction((manager) =>
      manager.query(
        `CREATE TRIGGER broken BEFORE UPDATE ON outbox_mails BEGIN SELECT RAISE(ABORT, 'crash'); END`,
      ),
    );
    await expect(relay(app)).rejects.toThrow('crash');
    await app.db.writeTransaction((manager) => manager.query('DROP TRIGGER broken'));
    await relay(app);
    expect(app.transport.sent).toHaveLength(2);
    expect(app.transport.sent[0]?.messageId).toBe(app.transport.sent[1]?.messageId);
  });

  it('puts a mail aside that the server goes on refusing, and the others pass it', async () => {
    const app = await withMails(1);
    app.transport.fault = answered(550);
    for (let attempt = 0; attempt < 12; attempt += 1) {
      await relay(app);
      app.clock.advance(5 * MINUTE);
    }
    const [mail] = await app.mails();
    expect(mail).toMatchObject({ attempts: 8, last_error: '550', sent_at: null });
    expect((mail as unknown as { parked_at: string | null }).parked_at).not.toBeNull();
  });

  it('waits longer after each refusal, four minutes at most', async () => {
    const app = await withMails(1);
    app.transport.fault = answered(451);
    const waits: number[] = [];
    for (let attempt = 0; attempt < 7; attempt += 1) {
      await relay(app);
      const [mail] = (await app.mails()) as unknown as { next_attempt_at: string }[];
      waits.push((Date.parse(mail?.next_attempt_at ?? '') - app.clock.millis()) / SECOND);
      app.clock.set(mail?.next_attempt_at ?? '');
    }
    expect(waits).toEqual([10, 20, 40, 80, 160, 240, 240]);
  });
});

describe('a mail', () => {
  it('cannot be bent by a name', () => {
    const mail = composeMail({
      subject: 'Part <b>\r\nBcc: all@evil.example',
      to: 'Ada\r\n.\r\nQUIT',
      paragraphs: ['<script>alert(1)</script>'],
      facts: [['Part', '"><img src=x>']],
      link: { label: 'Open', url: 'https://t.example/a?b=1&c="' },
    });
    expect(mail.subject).not.toMatch(/[\r\n]/);
    expect(mail.text.split('\n')[0]).toBe('Ada . QUIT,');
    expect(mail.html).not.toMatch(/<script|<img/);
  });
});
