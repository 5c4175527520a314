import Link from 'next/link';
import { LinkButton } from '@/components/ui/button';

const linkClass = 'inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline';

/** The pages around a spec. */
export function SpecLinks({
  orderNumber,
  mayEdit,
  isSigned,
}: {
  orderNumber: string;
  mayEdit: boolean;
  isSigned: boolean;
}) {
  const path = `/builds/${orderNumber}/spec`;
  return (
    <nav aria-label="Spec" className="flex flex-wrap items-center gap-x-6">
      <Link href={`${path}/versions`} className={linkClass}>
        Versions
      </Link>
      <Link href={`${path}/frets`} className={linkClass}>
        Fret table and 1:1 sheet
      </Link>
      {isSigned && (
        <Link href={`${path}/changes`} className={linkClass}>
          Changes
        </Link>
      )}
      {mayEdit && (
        <LinkButton href={`${path}/edit`} variant="quiet">
          Edit the spec
        </LinkButton>
      )}
    </nav>
  );
}
