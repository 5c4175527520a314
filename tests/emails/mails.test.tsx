import { wcagContrast } from 'culori';
import { describe, expect, test } from 'vitest';
import { Digest } from '@/emails/digest';
import { dark, light } from '@/emails/palette';
import { renderMail } from '@/emails/render-mail';
import { SignIn } from '@/emails/sign-in';
import { UnsafeLink } from '@/lib/mail/mail-link';
import { digest, invitation, letter, notice, oneOfEach, plainWords, question, signIn } from './samples';

const mails = oneOfEach(plainWords);
const propsOf = {
  'sign-in': signIn(plainWords),
  invitation: invitation(plainWords),
  digest: digest(plainWords),
  question: question(plainWords),
  letter: letter(plainWords),
  notice: notice(plainWords),
};

/** Every string and number in a mail's props, as deep as they lie; ids of pictures and the reader's side are not facts. */
function facts(value: unknown, key = ''): string[] {
  if (key === 'photoCid' || key === 'reader' || key === 'minutes' || key === 'moreCount') return [];
  if (typeof value === 'object' && value !== null)
    return Object.entries(value).flatMap(([name, part]) => facts(part, name));
  return [String(value)];
}

const addressesIn = (html: string) => [...html.matchAll(/(\w+)="((?:https?|cid|data|ftp):[^"]*|\/\/[^"]*)"/g)];

describe.each(mails)('the $mail mail', ({ mail, element, subject }) => {
  test('fetches nothing: links are its only addresses', async () => {
    const { html } = await renderMail(element);
    const fetched = addressesIn(html).filter(([, name]) => name !== 'href');
    expect(fetched.map(([, , address]) => address)).toEqual(mail === 'digest' ? ['cid:photo-2'] : []);
    expect(html).not.toMatch(
      /<(?:link|script|iframe|object|embed|form|video|audio|svg)\b|@import|@font-face|url\(|background="/i,
    );
    expect(html).not.toMatch(/srcset|<img(?![^>]*src="cid:)/i);
  });

  test('says in plain text all that it was given', async () => {
    const { text } = await renderMail(element);
    const given = Object.entries(propsOf).find(([name]) => name === mail)?.[1];
    const missing = facts(given).filter((fact) => !text.includes(fact));
    expect(facts(given).length).toBeGreaterThanOrEqual(3);
    expect(missing).toEqual([]);
  });

  test('has in plain text every link of the HTML, and no markup', async () => {
    const { html, text } = await renderMail(element);
    const links = addressesIn(html)
      .filter(([, name]) => name === 'href')
      .map(([, , address = '']) => address);
    expect(links.length).toBeGreaterThan(0);
    expect(links.filter((link) => !text.includes(link))).toEqual([]);
    expect(text).not.toMatch(/<\/?\w|cid:|\u200c|\u200b/);
  });

  test('follows a dark screen', async () => {
    const { html } = await renderMail(element);
    expect(html).toContain('<meta name="color-scheme" content="light dark"/>');
    expect(html).toContain('@media (prefers-color-scheme: dark)');
    expect(html).toContain(`.sheet { background-color: ${dark.sheet} !important; }`);
  });

  test('names its subject as its title and its language', async () => {
    const { html } = await renderMail(element);
    expect(html).toContain(`<title>${subject}</title>`);
    expect(html).toMatch(/<html[^>]* lang="en"/);
  });
});

describe('the two schemes', () => {
  // WCAG 2.2, 1.4.3: 4.5:1 for text.
  test.each([
    { scheme: 'light', colours: light },
    { scheme: 'dark', colours: dark },
  ])('keep text readable in the $scheme one', ({ colours }) => {
    for (const text of [colours.ink, colours.soft, colours.teal]) {
      expect(wcagContrast(text, colours.sheet)).toBeGreaterThanOrEqual(4.5);
    }
    expect(wcagContrast(colours.onTeal, colours.teal)).toBeGreaterThanOrEqual(4.5);
  });
});

describe('a digest', () => {
  const [build] = digest(plainWords).builds;

  test('of 36 pages with all their readings stays below the 102 kB at which a mail is cut off', async () => {
    if (build === undefined) throw new Error('no build');
    const entries = Array.from({ length: 12 }, (_, i) => ({
      dateWords: `${i + 1} September`,
      authorWords: 'Tove Järvi, finish',
      textExcerpt: 'Colour is on. '.repeat(20),
      readings: Array.from(
        { length: 5 },
        (_, line) => `Action at the 12th fret, string ${line}: 1.59 mm, within its tolerance`,
      ),
      photoCid: `photo-${i}`,
      photoAlt: 'Body in the booth',
      url: `${build.url}#${i}`,
    }));
    const builds = ['Q-1', 'Q-2', 'Q-3'].map((orderNumber) => ({ ...build, orderNumber, entries }));
    const { html } = await renderMail(<Digest {...digest(plainWords)} builds={builds} />);
    expect(Buffer.byteLength(html)).toBeLessThan(102_000);
  });

  test('with held builds alone tells no number, name, note or picture', async () => {
    const props = { ...digest(plainWords), builds: [] };
    const { html, text } = await renderMail(<Digest {...props} />);
    for (const part of [html, text]) {
      expect(part).toContain('There is something new on one of your orders');
      expect(part).not.toMatch(/Q-2417|Nightjar|Colour|<img/);
    }
  });

  test('tells of two held builds twice and does not fall over the same address', async () => {
    const props = {
      ...digest(plainWords),
      builds: [],
      held: [{ url: 'https://a.example/' }, { url: 'https://a.example/' }],
    };
    const { text } = await renderMail(<Digest {...props} />);
    expect(text.match(/something new on one of your orders\. Sign in/g)).toHaveLength(2);
  });

  test('counts pages it does not show', async () => {
    expect((await renderMail(<Digest {...digest(plainWords)} />)).text).toContain('Three more pages in the diary.');
  });
});

test('a mail with a link that is not https is not made', async () => {
  const props = { ...signIn(plainWords), link: 'javascript:alert(1)' };
  await expect(renderMail(<SignIn {...props} />)).rejects.toThrow(UnsafeLink);
});

test('how long the sign-in link works is said', async () => {
  expect((await renderMail(<SignIn {...signIn(plainWords)} />)).text).toContain('for ten minutes');
  expect((await renderMail(<SignIn {...signIn(plainWords)} minutes={1} />)).text).toContain('for one minute.');
});
