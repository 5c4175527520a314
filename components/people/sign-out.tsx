import { Button } from '@/components/ui/button';

/** A plain form, so that signing out works when nothing else does; the answer clears what the browser kept. */
export function SignOut() {
  return (
    <form method="post" action="/api/auth/signout">
      <Button type="submit" variant="quiet">
        Sign out here
      </Button>
    </form>
  );
}
