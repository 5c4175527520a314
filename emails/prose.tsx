import { Fragment, type ReactNode } from 'react';
import { light, sans, serif } from './palette';

interface ProseProps {
  children: ReactNode;
}

const words = { margin: '0 0 16px', overflowWrap: 'break-word', wordBreak: 'break-word' } as const;
const title = { ...words, color: light.ink, font: `600 24px/30px ${sans}` };
const line = { ...words, color: light.ink, font: `16px/24px ${sans}` };
const softLine = { ...words, color: light.soft, font: `14px/21px ${sans}` };
const written = { ...words, color: light.ink, font: `17px/27px ${serif}` };

/** What the mail is about, once at its top. */
export function Title({ children }: ProseProps) {
  return (
    <h1 className="ink" style={title}>
      {children}
    </h1>
  );
}

/** A paragraph of the shop's own words. */
export function Line({ children }: ProseProps) {
  return (
    <p className="ink" style={line}>
      {children}
    </p>
  );
}

/** A paragraph that may be skipped: dates, reasons, small print. */
export function SoftLine({ children }: ProseProps) {
  return (
    <p className="soft" style={softLine}>
      {children}
    </p>
  );
}

/** Words a person wrote, set to be read in their own direction; line breaks are kept. */
export function Written({ children, gapBelowPx = 16 }: { children: string; gapBelowPx?: number }) {
  return (
    <p dir="auto" className="ink" style={{ ...written, margin: `0 0 ${gapBelowPx}px` }}>
      {children.split(/\r?\n/).map((part, i) => (
        <Fragment key={i}>
          {i > 0 && <br />}
          {part}
        </Fragment>
      ))}
    </p>
  );
}
