import { LinkButton } from '@/components/ui/button';

/** The way to the questions after these, if there are any. */
export function NextPageLink({ path, next }: { path: string; next: string | null }) {
  if (!next) return null;
  return (
    <div>
      <LinkButton variant="quiet" href={`${path}${path.includes('?') ? '&' : '?'}after=${next}`}>
        Show the questions after these
      </LinkButton>
    </div>
  );
}
