import type { ReactNode } from 'react';
import { Avatar } from '@/components/ui/avatar';
import { LinkButton } from '@/components/ui/button';
import type { BuildHead } from '@/db/queries/builds';
import { mailWords, type MailPlan } from '@/lib/mail/plan-words';

type Person = { id: string; name: string; role: string; department: string | null };

type BuildAsideProps = {
  build: BuildHead;
  staff: Person[];
  mail: MailPlan | null;
  zone: string;
  mayAsk: boolean;
  mayPost: boolean;
};

/** Beside the diary: who builds it, what one can do, how mail comes. */
export function BuildAside({ build, staff, mail, zone, mayAsk, mayPost }: BuildAsideProps) {
  return (
    <aside className="grid content-start gap-8">
      {mayAsk && (
        <LinkButton href={`/builds/${build.orderNumber}/questions/new`} isWide>
          Ask the shop
        </LinkButton>
      )}
      {mayPost && (
        <LinkButton href={`/bench/${build.orderNumber}`} isWide>
          Post to this diary
        </LinkButton>
      )}
      <Block title="People on this build">
        <ul role="list" className="grid gap-3">
          {staff.map((person) => (
            <li key={person.id} className="flex items-center gap-3">
              <Avatar name={person.name} />
              <span>
                <bdi className="block font-semibold">{person.name}</bdi>
                <span className="block text-sm text-soft">{person.role === 'rep' ? 'rep' : person.department}</span>
              </span>
            </li>
          ))}
        </ul>
      </Block>
      {mail && (
        <Block title="Mail to you">
          <p className="text-soft">{mailWords(mail, zone)}</p>
          <p className="mt-2">
            <a href="/me" className="inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline">
              Change
            </a>
          </p>
        </Block>
      )}
    </aside>
  );
}

function Block({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="border-t-2 border-ink pt-3">
      <h2 className="mb-4 font-semibold">{title}</h2>
      {children}
    </section>
  );
}
