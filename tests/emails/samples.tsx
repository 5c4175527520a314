import { Digest, subject as digestSubject, type DigestProps } from '@/emails/digest';
import { Invitation, subject as invitationSubject, type InvitationProps } from '@/emails/invitation';
import { Letter, subject as letterSubject, type LetterProps } from '@/emails/letter';
import { nameInLine } from '@/emails/name';
import { Notice, subject as noticeSubject, type NoticeProps } from '@/emails/notice';
import { QuestionAsked, subject as questionSubject, type QuestionAskedProps } from '@/emails/question-asked';
import { SignIn, subject as signInSubject, type SignInProps } from '@/emails/sign-in';

const site = 'https://diary.example.com';

/** Every word a mail is given, so that a test can put its own in each place. */
export interface Words {
  person: string;
  shopName: string;
  instrument: string;
  excerpt: string;
}

export const plainWords: Words = {
  person: 'Maren Oyelaran',
  shopName: 'Quillhaven Guitar Works',
  instrument: 'Nightjar baritone',
  excerpt: 'Colour is on.\nIt hangs for two weeks.',
};

export function signIn({ shopName }: Words): SignInProps {
  return { shopName, link: `${site}/sign-in#t=abc`, code: '482913', minutes: 10 };
}

export function invitation({ person, shopName }: Words): InvitationProps {
  const roleWords = 'the owner of Q-2417';
  return { name: person, shopName, roleWords, inviterName: person, link: `${site}/invitations#t=abc` };
}

export function digest({ person, shopName, instrument, excerpt }: Words): DigestProps {
  const entry = { authorWords: `${person}, finish`, textExcerpt: excerpt, readings: ['Nut width: 42.85 mm'] };
  const build = `${site}/builds/Q-2417`;
  return {
    readerName: person,
    shopName,
    builds: [
      {
        instrument,
        ownerName: person,
        orderNumber: 'Q-2417',
        url: build,
        stageWords: 'in the finish room since 16 September',
        readyWords: 'between 20 October and 6 November',
        entries: [
          {
            ...entry,
            dateWords: '29 September',
            url: `${build}#2`,
            photoCid: 'photo-2',
            photoAlt: 'Body in the booth',
          },
          { ...entry, dateWords: '14 August', url: `${build}#1` },
        ],
        moreCount: 3,
      },
    ],
    news: [{ words: `${person} answered your question`, url: `${site}/questions/77` }],
    held: [{ url: `${site}/me/orders` }],
    settingsUrl: `${site}/me/mail`,
    unsubscribeUrl: `${site}/u/abc`,
  };
}

export function question({ person, shopName, instrument, excerpt }: Words): QuestionAskedProps {
  const dueWords = '30 September at 14:00';
  const url = `${site}/questions/77`;
  return { shopName, orderNumber: 'Q-2417', instrument, topic: 'Finish', askerName: person, excerpt, dueWords, url };
}

export function letter({ person, shopName, instrument, excerpt }: Words): LetterProps {
  const about = { orderNumber: 'Q-2417', instrument, topic: 'Neck' };
  return { shopName, reader: 'client', authorName: person, excerpt, url: `${site}/questions/77`, ...about };
}

export function notice({ person, shopName, instrument, excerpt }: Words): NoticeProps {
  return {
    shopName,
    title: `${nameInLine(person)} signed: Drawing of the headstock`,
    build: { orderNumber: 'Q-2417', instrument },
    lines: [`${nameInLine(person)} holds the pen.`],
    quoted: excerpt,
    action: 'See the sign-off',
    url: `${site}/builds/Q-2417`,
    why: 'You get this because you are on this build.',
  };
}

/** One of each mail, with its subject. */
export function oneOfEach(words: Words) {
  return [
    { mail: 'sign-in', element: <SignIn {...signIn(words)} />, subject: signInSubject(signIn(words)) },
    {
      mail: 'invitation',
      element: <Invitation {...invitation(words)} />,
      subject: invitationSubject(invitation(words)),
    },
    { mail: 'digest', element: <Digest {...digest(words)} />, subject: digestSubject(digest(words)) },
    { mail: 'question', element: <QuestionAsked {...question(words)} />, subject: questionSubject(question(words)) },
    { mail: 'notice', element: <Notice {...notice(words)} />, subject: noticeSubject(notice(words)) },
    { mail: 'letter', element: <Letter {...letter(words)} />, subject: letterSubject(letter(words)) },
  ];
}
