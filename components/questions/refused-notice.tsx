import { Notice } from '@/components/ui/notice';
import type { Refused } from '@/lib/send-json';

/** Why nothing was sent; what concerns a field stands at the field as well. `shown` names those fields. */
export function RefusedNotice({ refused, shown }: { refused: Refused | null; shown: string[] }) {
  if (!refused) return null;
  const others = Object.entries(refused.fields).filter(([field]) => !shown.includes(field));
  return (
    <Notice tone="late" role="alert">
      {others.length > 0 ? others.map(([field, sentence]) => <p key={field}>{sentence}</p>) : refused.message}
      {refused.status === 401 && (
        <p>
          <a
            href="/sign-in"
            target="_blank"
            rel="noopener"
            className="inline-flex min-h-11 items-center font-semibold underline underline-offset-2"
          >
            Sign in on a page of its own
          </a>
        </p>
      )}
    </Notice>
  );
}
