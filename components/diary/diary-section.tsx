import { Entry, type EntryView } from './entry';
import type { Section } from './sections';

type DiarySectionProps = EntryView & { section: Section; note?: string; isFirst: boolean };

/** The pages of one stage under its name. */
export function DiarySection({ section, note, isFirst, ...view }: DiarySectionProps) {
  const { stage, entries } = section;
  return (
    <section className="mb-10">
      <h2 className="text-xl">
        {stage}
        {note && <span className="ml-3 font-sans text-sm font-normal text-soft [font-stretch:100%]">{note}</span>}
      </h2>
      <ol role="list">
        {entries.map((entry, index) => (
          <Entry key={entry.id} entry={entry} isFirst={isFirst && index === 0} {...view} />
        ))}
      </ol>
    </section>
  );
}
