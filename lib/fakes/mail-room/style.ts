/** The look of the mail room's pages, in both themes. */
export const STYLE = `:root {
  color-scheme: light dark;
  --ground: oklch(0.968 0.006 195);
  --sheet: oklch(0.995 0.002 195);
  --line: oklch(0.87 0.01 200);
  --ink: oklch(0.24 0.018 230);
  --soft: oklch(0.45 0.02 220);
  --link: oklch(0.42 0.08 200);
}
@media (prefers-color-scheme: dark) {
  :root {
    --ground: oklch(0.2 0.012 230);
    --sheet: oklch(0.24 0.014 230);
    --line: oklch(0.36 0.015 225);
    --ink: oklch(0.94 0.008 200);
    --soft: oklch(0.76 0.015 215);
    --link: oklch(0.82 0.08 195);
  }
}
* { box-sizing: border-box; }
body {
  margin: 0 auto;
  padding: 1.5rem clamp(1rem, 4vw, 3rem) 4rem;
  max-width: 60rem;
  background: var(--ground);
  color: var(--ink);
  font: 1rem/1.5 system-ui, sans-serif;
  overflow-wrap: anywhere;
}
a { color: var(--link); text-underline-offset: 0.2em; }
a:focus-visible, iframe:focus-visible { outline: 3px solid var(--link); outline-offset: 2px; }
nav { padding-bottom: 0.75rem; border-bottom: 2px solid var(--ink); }
nav a { display: inline-block; padding: 0.5rem 0; margin-right: 1rem; }
h1 { font-size: 1.6rem; line-height: 1.25; font-weight: 600; margin: 1.5rem 0 0.5rem; }
h2 { font-size: 1.1rem; font-weight: 600; margin: 2rem 0 0.5rem; }
p { max-width: 62ch; }
.soft, time, th { color: var(--soft); }
table { width: 100%; border-collapse: collapse; font-variant-numeric: tabular-nums; }
th, td { padding: 0.75rem 1rem 0.75rem 0; text-align: left; vertical-align: top; border-bottom: 1px solid var(--line); }
th { font-weight: 500; white-space: nowrap; }
.count { text-align: right; }
.mails { list-style: none; margin: 1rem 0; padding: 0; }
.mails li { padding: 0.75rem 0; border-bottom: 1px solid var(--line); }
.mails a { display: block; padding: 0.25rem 0; font-weight: 600; }
dl { display: grid; grid-template-columns: minmax(6rem, max-content) 1fr; gap: 0.35rem 1.25rem; margin: 1rem 0; }
dt { color: var(--soft); }
dd { margin: 0; }
form { display: grid; gap: 0.75rem; max-width: 40rem; }
form label { display: grid; gap: 0.25rem; }
form label:has([type='checkbox']) { grid-template-columns: auto 1fr; align-items: baseline; }
input, textarea, button { font: inherit; padding: 0.5rem 0.75rem; border: 1px solid var(--soft); border-radius: 5px; }
textarea, input:not([type='checkbox']) { background: var(--sheet); color: var(--ink); width: 100%; }
button { justify-self: start; min-height: 2.75rem; background: var(--link); color: var(--sheet); font-weight: 600; cursor: pointer; }

iframe { width: 100%; height: 70vh; resize: vertical; border: 1px solid var(--line); border-radius: 5px; background: #fff; }
pre {
  margin: 0;
  padding: 1rem;
  white-space: pre-wrap;
  background: var(--sheet);
  border: 1px solid var(--line);
  border-radius: 5px;
  font: 0.95rem/1.55 ui-monospace, monospace;
}
@media (max-width: 30rem) {
  dl { grid-template-columns: 1fr; gap: 0; }
  dd { margin-bottom: 0.6rem; }
}
`;
