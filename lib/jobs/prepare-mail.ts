import { composeMail } from './compose-mail';
import { findMailReader, type MailReader } from '@/db/queries/mail-content';
import { replaceMail, wasSignInTried, type ClaimedMail, type Settled } from '@/db/queries/outbox';
import type { FrozenMail } from '@/lib/mail/kinds';
import { quietUntil } from '@/lib/schedule/quiet-hours';

const DAY_MS = 24 * 3_600_000;
/** As long as the provider remembers an idempotency key; later an unknown outcome may have been a delivery. */
const KEY_REMEMBERED_MS = DAY_MS;

export type Prepared =
  | { is: 'ready'; mail: ClaimedMail; frozen: FrozenMail }
  | { is: 'over'; mail: ClaimedMail; settled: Settled }
  | { is: 'replaced' };

/** Looks at everything again that could have changed since a mail was written: its hour, its reader, its content. */
export async function prepareMail(mail: ClaimedMail, owner: string, nowMs: number): Promise<Prepared> {
  const over = (settled: Settled): Prepared => ({ is: 'over', mail, settled });
  if (mail.firstAttemptAt !== null && nowMs - mail.firstAttemptAt > KEY_REMEMBERED_MS)
    return over({ state: 'parked', problem: 'for a day nobody said whether it went out' });
  const reader = await findMailReader(mail.userId);
  if (!reader) return over({ state: 'dropped', problem: 'its reader may no longer read it' });
  const stopped = await whyStopped(mail, reader, nowMs);
  if (stopped) return over(stopped);
  const current = await composeMail(mail, reader, nowMs);
  if (!current) return over({ state: 'dropped', problem: 'its reader may no longer read it' });
  if (!mail.frozen) return { is: 'ready', mail, frozen: current };
  if (saysTheSame(mail.frozen, current)) return { is: 'ready', mail, frozen: mail.frozen };
  await replaceMail(mail, owner, mail.about, nowMs);
  return { is: 'replaced' };
}

/** A sign-in link is asked for by its reader: no hour is too late for it, and an address that fails gets one a day. */
async function whyStopped(mail: ClaimedMail, reader: MailReader, nowMs: number): Promise<Settled | null> {
  if (mail.kind === 'sign_in') {
    const isUsedUp = reader.unreachableWhy !== null && (await wasSignInTried(mail, nowMs - DAY_MS));
    return isUsedUp ? { state: 'dropped', problem: `${unreachable(reader)}; one link a day is tried` } : null;
  }
  if (reader.unreachableWhy !== null) return { state: 'dropped', problem: unreachable(reader) };
  const { quietFromHour: fromHour, quietToHour: toHour, timeZone: zone } = reader;
  const untilMs = quietUntil({ fromHour, toHour, zone }, nowMs);
  return untilMs === null ? null : { state: 'postponed', untilMs };
}

const unreachable = ({ unreachableWhy }: MailReader) =>
  unreachableWhy === 'complained' ? 'its reader called our mail unwanted' : 'mail to this address comes back';

/** Rights, addresses and entries are looked at again before every try: frozen bytes go out only while all still holds. */
function saysTheSame(frozen: FrozenMail, current: FrozenMail): boolean {
  return frozen.to === current.to && frozen.text === current.text && frozen.photos.length === current.photos.length;
}
