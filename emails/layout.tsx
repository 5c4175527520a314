import type { ReactNode } from 'react';
import { Body, Container, Head, Html, Preview, Section } from 'react-email';
import { Name } from './name';
import { light, sans, styleSheet } from './palette';

interface LayoutProps {
  shopName: string;
  subject: string;
  /** The words a list of mails shows after the subject. */
  preview: string;
  /** Why the reader gets this mail, and how to change that. */
  footer: ReactNode;
  children: ReactNode;
}

/** The sheet every mail is written on. It fetches nothing and reads whole without pictures or style sheet. */
export function Layout({ shopName, subject, preview, footer, children }: LayoutProps) {
  const head = { borderBottom: `2px solid ${light.ink}`, color: light.ink, font: `600 15px/24px ${sans}` };
  return (
    <Html lang="en">
      <Head>
        <title>{subject}</title>
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="color-scheme" content="light dark" />
        <meta name="supported-color-schemes" content="light dark" />
        <meta name="format-detection" content="telephone=no, date=no, address=no, email=no" />
        <style>{styleSheet}</style>
      </Head>
      <Body className="film" style={{ backgroundColor: light.film, margin: 0, padding: '24px 12px' }}>
        <Preview useTitleTag={false}>{preview}</Preview>
        <Container
          className="sheet"
          tdClassName="margin"
          style={{ backgroundColor: light.sheet, borderRadius: '6px', maxWidth: '600px', padding: '28px 36px' }}
        >
          <p className="ink" style={{ ...head, margin: '0 0 28px', padding: '0 0 10px' }}>
            <Name>{shopName}</Name>
          </p>
          {children}
          <Section
            className="line"
            style={{ borderTop: `1px solid ${light.line}`, marginTop: '12px', paddingTop: '16px' }}
          >
            {footer}
          </Section>
        </Container>
      </Body>
    </Html>
  );
}
