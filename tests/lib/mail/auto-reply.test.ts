import { describe, expect, test } from 'vitest';
import { isDisowned, whyAutomatic, type MailFields } from '@/lib/mail/auto-reply';
import { readReference } from '../../support/reference';

const own = 'Quillhaven Guitar Works <diary@quillhaven.example>';
const person = 'Maren <maren@clients.example>';

describe('a mail that no person wrote is known', () => {
  test.each<{ fields: MailFields; from?: string }>([
    { fields: { 'auto-submitted': 'auto-replied' } },
    { fields: { 'auto-submitted': 'auto-generated; owner-email="a@b.example"' } },
    { fields: { precedence: 'bulk' } },
    { fields: { precedence: 'Auto_Reply' } },
    { fields: { 'list-id': 'Luthiers <luthiers.lists.example>' } },
    { fields: { 'list-unsubscribe': '<https://lists.example/u>' } },
    { fields: { 'x-auto-response-suppress': 'All' } },
    { fields: { 'return-path': '<>' } },
    { fields: { 'content-type': 'multipart/report; report-type=delivery-status' } },
    { fields: { 'message-id': '<mail.abc_DEF-123@quillhaven.example>' } },
    { fields: {}, from: 'MAILER-DAEMON@mx.clients.example' },
    { fields: {}, from: 'no-reply@clients.example' },
    { fields: {}, from: own },
    { fields: {}, from: 'two@a.example, three@b.example' },
  ])('by $fields $from', ({ fields, from = person }) => {
    expect(whyAutomatic(fields, from, own)).toMatch(/^[a-z].+/);
  });

  // RFC 3834, 5, in the form kept in tests/reference/11_mail_headers.csv: our own mails are known by it too.
  test('by the very header that our mails carry', () => {
    const row = readReference('11_mail_headers').find(({ field }) => field === 'Auto-Submitted');
    const [name = '', value = ''] = (row?.exact_form ?? '').split(': ');
    expect(whyAutomatic({ [name.toLowerCase()]: value }, person, own)).toBe('it says that a machine sent it');
  });
});

test.each<MailFields>([
  {},
  { 'auto-submitted': 'no' },
  { precedence: 'normal' },
  { 'message-id': '<x@clients.example>' },
])('a person’s mail with %j is taken', (fields) => {
  expect(whyAutomatic(fields, person, own)).toBeNull();
});

test('a mail that its sender’s own domain disowns is known', () => {
  expect(isDisowned({ 'authentication-results': 'mx.example; spf=pass; dmarc=fail (p=REJECT)' })).toBe(true);
  expect(isDisowned({ 'authentication-results': 'mx.example; dmarc=pass' })).toBe(false);
});
