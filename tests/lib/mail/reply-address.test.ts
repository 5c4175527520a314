import { expect, test } from 'vitest';
import { newId } from '@/db/schema/columns';
import { readReplyAddress, replyAddress } from '@/lib/mail/reply-address';
import { testEnv } from '../../support/database';

Object.assign(process.env, testEnv, { DATABASE_URL: 'file:unused.db' });

const [questionId, userId, otherId] = [newId(), newId(), newId()];
const address = replyAddress(questionId, userId) ?? '';
const [local = ''] = address.split('@');

test('names the question, is for one person alone, and fits an address', () => {
  const token = readReplyAddress(address);
  expect(token?.questionId).toBe(questionId);
  expect(token?.isFor(userId)).toBe(true);
  expect(token?.isFor(otherId)).toBe(false);
  // RFC 5321, 4.5.3.1.1: 64 octets before the @.
  expect(local.length).toBeLessThanOrEqual(64);
  expect(address.endsWith(`@${testEnv.MAIL_REPLY_DOMAIN}`)).toBe(true);
});

test('survives a mail program that writes it in capitals', () => {
  expect(readReplyAddress(address.toUpperCase())?.isFor(userId)).toBe(true);
});

test('with any one letter changed is for nobody', () => {
  for (let i = 'reply+'.length; i < local.length; i++) {
    const changed = local.slice(0, i) + (local.charAt(i) === 'b' ? 'c' : 'b') + local.slice(i + 1);
    const token = readReplyAddress(`${changed}@${testEnv.MAIL_REPLY_DOMAIN}`);
    // The last letter of each half carries bits that are cut off.
    const isSpare = i === 32 || i === local.length - 1;
    if (!isSpare) expect(token?.isFor(userId) ?? false).toBe(false);
  }
});

test.each([
  'reply+@answers.shop.example',
  'reply+abc@answers.shop.example',
  `${local}@elsewhere.example`,
  'x',
  '@',
  '',
])('%j is no address of ours', (other) => expect(readReplyAddress(other)).toBeNull());

test('an id that is not one of ours has none', () => {
  expect(replyAddress('question-1', userId)).toBeUndefined();
});
