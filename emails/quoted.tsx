import { Section } from 'react-email';
import { light } from './palette';
import { Line, Written } from './prose';

/** Beside a letter that can be answered from the mail program. */
export const REPLY = 'You can also answer this mail: what you write above the quoted part becomes your letter.';

interface QuotedProps {
  /** What was written; undefined when mail may not carry it. */
  children: string | undefined;
  /** Marks it in brass, the colour of what waits on the reader. */
  waitsOnYou?: boolean;
}

/** A letter's beginning, or a sentence in its place when the build is held from view. */
export function Quoted({ children, waitsOnYou = false }: QuotedProps) {
  if (children === undefined) return <Line>This order is held from view, so its words are not in this mail.</Line>;
  const border = `3px solid ${waitsOnYou ? light.brass : light.line}`;
  return (
    <Section className={waitsOnYou ? undefined : 'line'} style={{ borderLeft: border, margin: '0 0 24px' }}>
      <div style={{ padding: '2px 0 4px 16px' }}>
        <Written gapBelowPx={0}>{children}</Written>
      </div>
    </Section>
  );
}
