import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';

/** Words to look for; works without any script. */
export function SearchBox({ typed, where }: { typed: string; where: string }) {
  return (
    <form role="search" action="/search" className="flex max-w-2xl flex-wrap items-end gap-3">
      <TextInput
        label={`Words in ${where}`}
        name="words"
        type="search"
        defaultValue={typed}
        maxLength={200}
        autoComplete="off"
        className="min-w-56 flex-1"
      />
      <Button type="submit" className="min-h-11">
        Search
      </Button>
    </form>
  );
}
