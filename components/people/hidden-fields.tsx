export type HiddenValues = Record<string, string>;

/** What a form sends that nobody types. */
export function HiddenFields({ values }: { values: HiddenValues }) {
  return Object.entries(values).map(([name, value]) => <input key={name} type="hidden" name={name} value={value} />);
}
