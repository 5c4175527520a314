import { describe, expect, test } from 'vitest';
import { subject as digestSubject } from '@/emails/digest';
import { subject as invitationSubject } from '@/emails/invitation';
import { subject as letterSubject } from '@/emails/letter';
import { subject as noticeSubject } from '@/emails/notice';
import { subject as questionSubject } from '@/emails/question-asked';
import { subject as signInSubject } from '@/emails/sign-in';
import { UnsafeHeader } from '@/lib/mail/headers';
import { digest, invitation, letter, notice, plainWords, question, signIn } from './samples';

describe('the subject of a digest says what is new', () => {
  const given = { ...digest(plainWords), news: [] };
  const [sample] = given.builds;
  if (sample === undefined) throw new Error('no build');
  const [first] = sample.entries;
  if (first === undefined) throw new Error('no entry');
  const mine = { ...sample, ownerName: undefined, moreCount: 0 };

  test.each([
    { builds: [mine], says: 'Two new pages in the diary of your Nightjar baritone' },
    { builds: [{ ...mine, entries: [first] }], says: 'One new page in the diary of your Nightjar baritone' },
    { builds: [{ ...mine, moreCount: 11 }], says: '13 new pages in the diary of your Nightjar baritone' },
    { builds: [{ ...mine, entries: [] }], says: 'News of your Nightjar baritone' },
    { builds: [sample], says: 'Five new pages in the diary of the Nightjar baritone of Maren Oyelaran' },
    { builds: [mine, mine, mine], says: 'Six new pages in three diaries' },
    {
      builds: [
        { ...mine, entries: [] },
        { ...mine, entries: [] },
      ],
      says: 'There is news in two diaries',
    },
    { builds: [], says: 'There is something new on one of your orders' },
  ])('$says', ({ builds, says }) => expect(digestSubject({ ...given, builds })).toBe(says));

  const answered = { words: 'Ines answered your question', url: 'https://diary.example.com/questions/77' };

  test.each([
    { builds: [], news: [answered], says: 'Ines answered your question' },
    { builds: [], news: [answered, answered, answered], says: 'Ines answered your question, and two more things' },
    {
      builds: [mine],
      news: [answered],
      says: 'Ines answered your question, and two new pages in the diary of your Nightjar baritone',
    },
    {
      builds: [mine],
      news: [answered, answered],
      says: 'Two new pages in the diary of your Nightjar baritone, and two more things',
    },
  ])('$says', ({ builds, news, says }) => expect(digestSubject({ ...given, held: [], builds, news })).toBe(says));

  test('and a digest without news is not made', () => {
    expect(() => digestSubject({ ...given, builds: [], held: [] })).toThrow(RangeError);
  });
});

describe('the subject says what happened', () => {
  test('when a link was asked for, without giving the code away', () => {
    expect(signInSubject(signIn(plainWords))).toBe('Your sign-in link for Quillhaven Guitar Works');
  });

  test('when somebody is invited', () => {
    expect(invitationSubject({ ...invitation(plainWords), inviterName: 'Ruth Adeyemi' })).toBe(
      'Ruth Adeyemi invites you to the build diary of Quillhaven Guitar Works',
    );
  });

  test('when a question is asked', () => {
    expect(questionSubject(question(plainWords))).toBe('Maren Oyelaran asks about Q-2417: Finish');
  });

  test('when a letter comes, to either side', () => {
    const given = letter(plainWords);
    expect(letterSubject({ ...given, authorName: 'Ines' })).toBe('Ines answered your question');
    expect(letterSubject({ ...given, reader: 'shop' })).toBe('Maren Oyelaran wrote again about Q-2417');
    expect(letterSubject({ ...given, reader: 'shop', orderNumber: undefined })).toBe(
      'Maren Oyelaran wrote again about one of your builds',
    );
  });
});

describe('a name with a second line makes no subject', () => {
  test.each(['\r\nBcc: all@example.com', '\nBcc: all@example.com', '\rX: y', '\u2028x', '\0'])('%j', (tail) => {
    const evil = `Maren${tail}`;
    const words = { ...plainWords, person: evil, shopName: evil, instrument: evil };
    expect(() => signInSubject(signIn(words))).toThrow(UnsafeHeader);
    expect(() => invitationSubject(invitation(words))).toThrow(UnsafeHeader);
    expect(() => digestSubject(digest(words))).toThrow(UnsafeHeader);
    expect(() => questionSubject(question(words))).toThrow(UnsafeHeader);
    expect(() => questionSubject({ ...question(plainWords), topic: evil })).toThrow(UnsafeHeader);
    expect(() => letterSubject(letter(words))).toThrow(UnsafeHeader);
    expect(() => letterSubject({ ...letter(words), reader: 'shop' })).toThrow(UnsafeHeader);
    expect(() => noticeSubject(notice(words))).toThrow(UnsafeHeader);
  });
});
