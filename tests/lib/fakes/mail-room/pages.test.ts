import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { mailTo, startTestRoom } from './fixture';

let room: Awaited<ReturnType<typeof startTestRoom>>;
beforeAll(async () => {
  room = await startTestRoom();
});
afterAll(() => room.stop());

async function sendAndFind(to: string, change: Parameters<typeof mailTo>[1] = {}): Promise<string> {
  const { data } = await room.resend().emails.send(mailTo(to, change));
  return data?.id ?? '';
}

describe('the pages of the mail room', () => {
  test('list every address with its count and lead to its mails', async () => {
    await sendAndFind('bo@player.example');
    const id = await sendAndFind('bo@player.example', { cc: 'cy@player.example', subject: 'Neck carved' });
    const front = await room.page('/');
    expect(front).toContain('<title>Mail room</title>');
    expect(front).toMatch(
      /href="\/inbox\?to=bo%40player\.example"><bdi>bo@player\.example<\/bdi><\/a><\/td><td class="count">2</,
    );
    const inbox = await room.page('/inbox?to=bo%40player.example');
    expect(inbox.indexOf('Neck carved')).toBeLessThan(inbox.indexOf('Your top is glued'));
    expect(inbox).toContain(`href="/mail/${id}"`);
    expect(await room.page('/inbox?to=cy%40player.example')).toContain('Neck carved');
  });

  test('show a mail with its headers, its text with links, and its HTML in a frame whose links open', async () => {
    const id = await sendAndFind('di@player.example', {
      headers: { 'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click' },
    });
    const page = await room.page(`/mail/${id}`);
    expect(page).toContain('<dt>List-Unsubscribe-Post</dt>');
    expect(page).toContain('<a href="https://diary.example/builds/Q-2417" target="_blank"');
    expect(page).toContain(
      `sandbox="allow-popups allow-popups-to-escape-sandbox allow-top-navigation-by-user-activation" src="/mail/${id}/html"`,
    );
    expect(await room.page(`/mail/${id}/html`)).toContain('<head><base target="_blank">');
  });

  test('run no markup that comes with a mail', async () => {
    const evil = `"><script>alert(1)</script><img src=x onerror='alert(1)'>`;
    const id = await sendAndFind('ev@player.example', { subject: evil, text: evil, headers: { 'X-Evil': evil } });
    for (const path of ['/', '/inbox?to=ev%40player.example', `/mail/${id}`, `/inbox?to=${encodeURIComponent(evil)}`]) {
      const page = await room.page(path);
      expect(page).not.toContain('<script');
      expect(page).not.toContain('<img');
    }
  });

  test('carry policies that stop scripts, the frame ones too', async () => {
    const id = await sendAndFind('po@player.example', { html: '<script>alert(1)</script>' });
    const policyOf = async (path: string) => (await fetch(room.url + path)).headers.get('content-security-policy');
    for (const path of ['/', `/mail/${id}`, `/mail/${id}/html`]) {
      expect(await policyOf(path)).toMatch(/^default-src 'none'/);
      expect(await policyOf(path)).not.toContain('script-src');
    }
    expect(await policyOf(`/mail/${id}/html`)).toMatch(/sandbox (?!.*allow-(scripts|same-origin|forms))/);
  });

  test('hand an attachment out as a download only', async () => {
    const attachments = [{ filename: 'ü "x".html', content: Buffer.from('<b>'), contentType: 'text/html' }];
    const id = await sendAndFind('at@player.example', { attachments });
    const { headers } = await fetch(`${room.url}/mail/${id}/attachments/0`);
    expect(headers.get('content-disposition')).toBe("attachment; filename*=UTF-8''%C3%BC%20%22x%22.html");
    expect(headers.get('content-security-policy')).toContain('sandbox');
  });

  test('say so when there is nothing', async () => {
    expect((await fetch(`${room.url}/mail/00000000-0000-0000-0000-000000000000`)).status).toBe(404);
    await fetch(`${room.url}/mails`, { method: 'DELETE' });
    expect(await room.page('/')).toContain('No mail yet.');
    await room.restart();
    expect(await room.mails('bo@player.example')).toEqual([]);
  });
});
