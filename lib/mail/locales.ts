/** The ways to write a date that somebody may choose, by BCP 47 tag. */
export const localeTags = [
  'en-GB',
  'en-US',
  'de-DE',
  'es-ES',
  'fr-FR',
  'it-IT',
  'ja-JP',
  'nl-NL',
  'pt-BR',
  'sv-SE',
] as const;
export type LocaleTag = (typeof localeTags)[number];

const sampleMs = Date.UTC(2026, 8, 29, 17);

/** Each way with a date written by it: "29 September". */
export const localeOptions = localeTags.map((value) => ({
  value,
  label: new Intl.DateTimeFormat(value, { day: 'numeric', month: 'long', timeZone: 'UTC' }).format(sampleMs),
}));
