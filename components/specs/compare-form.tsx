import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import type { Side } from '@/lib/specs/compare';

type CompareFormProps = { numbers: number[]; hasDraft: boolean; from: Side; to: Side };

/** Picks the two sides; a plain form, since it only asks for another view of this page. */
export function CompareForm({ numbers, hasDraft, from, to }: CompareFormProps) {
  const options = [
    ...(hasDraft ? [{ value: 'draft', label: 'The draft' }] : []),
    ...numbers.map((number) => ({ value: `${number}`, label: `Version ${number}` })),
  ];
  return (
    <form method="get" className="flex flex-wrap items-end gap-4">
      <Select
        key={`from-${from}`}
        label="From"
        name="from"
        options={options}
        defaultValue={`${from}`}
        className="w-44"
      />
      <Select key={`to-${to}`} label="To" name="to" options={options} defaultValue={`${to}`} className="w-44" />
      <Button type="submit" variant="quiet">
        Compare
      </Button>
    </form>
  );
}
