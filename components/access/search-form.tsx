import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';

/** Looks somebody up by a part of their name or address. */
export function SearchForm({ search }: { search: string }) {
  return (
    <form role="search" className="flex max-w-md flex-wrap items-end gap-3">
      <TextInput
        label="Name or address"
        name="search"
        type="search"
        maxLength={100}
        defaultValue={search}
        className="min-w-0 flex-1"
      />
      <Button type="submit" variant="quiet" className="min-h-11">
        Look up
      </Button>
    </form>
  );
}
