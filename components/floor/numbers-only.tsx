/** Builds that stand on the floor and are out of the viewer's reach: their numbers, and nothing else. */
export function NumbersOnly({ numbers }: { numbers: readonly string[] }) {
  if (numbers.length === 0) return null;
  return (
    <section aria-label="By number only" className="border-t-2 border-ink pt-3">
      <h2 className="text-xl">
        {numbers.length === 1 ? 'One more, by its number only' : `${numbers.length} more, by number only`}
      </h2>
      <p className="mt-1 max-w-2xl text-soft">You are not on these, or they are held from view.</p>
      <ul role="list" className="mt-3 flex flex-wrap gap-x-4 gap-y-1">
        {numbers.map((number) => (
          <li key={number} className="narrow">
            {number}
          </li>
        ))}
      </ul>
    </section>
  );
}
