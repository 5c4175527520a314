import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';

/** The same draft is open in another tab, which may be in the middle of sending it. */
export function OpenElsewhere({ onTakeOver }: { onTakeOver: () => void }) {
  return (
    <div className="mx-auto max-w-2xl px-4.5 py-8">
      <EmptyState
        title="This entry is open in another tab"
        action={
          <Button size="bench" onClick={onTakeOver}>
            Go on here
          </Button>
        }
      >
        Go on there, or take it over here with all that is kept on this phone.
      </EmptyState>
    </div>
  );
}
