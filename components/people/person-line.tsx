import type { ReactNode } from 'react';
import { Avatar } from '@/components/ui/avatar';

/** One person in a list: name, what they are, and at the far end what can be done. */
export function PersonLine({ name, note, action }: { name: string; note?: ReactNode; action?: ReactNode }) {
  return (
    <li className="flex flex-wrap items-center gap-x-3 gap-y-2 border-b border-line py-3">
      <Avatar name={name} />
      <div className="min-w-0 flex-1 basis-40">
        <bdi className="block font-semibold">{name}</bdi>
        {note && <div className="text-sm break-words text-soft">{note}</div>}
      </div>
      {action}
    </li>
  );
}
