import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';

/** Finds a build by what is on its rack tag. */
export function FindBuild({ found, error }: { found: string; error?: string }) {
  return (
    <form action="/bench" className="grid max-w-md grid-cols-[minmax(0,1fr)_auto] items-start gap-3">
      <TextInput
        label="Order number"
        name="find"
        controlSize="bench"
        defaultValue={found}
        autoComplete="off"
        autoCapitalize="characters"
        enterKeyHint="search"
        maxLength={20}
        placeholder="Q-2417"
        error={error}
      />
      <Button type="submit" size="bench" className="mt-7.5">
        Find
      </Button>
    </form>
  );
}
