import { Button, Link, Section } from 'react-email';
import { requireMailLink } from '@/lib/mail/mail-link';
import { light, sans } from './palette';

interface LinkProps {
  href: string;
  children: string;
}

/** The one thing to do next. @throws UnsafeLink when `href` is not https */
export function Action({ href, children }: LinkProps) {
  return (
    <Section style={{ paddingBottom: '20px', paddingTop: '4px' }}>
      <Button
        href={requireMailLink(href)}
        className="action"
        style={{
          backgroundColor: light.teal,
          borderRadius: '4px',
          color: light.onTeal,
          fontFamily: sans,
          fontSize: '16px',
          fontWeight: 600,
          padding: '14px 20px',
        }}
      >
        {children}
      </Button>
    </Section>
  );
}

/** A link inside or below a text. @throws UnsafeLink when `href` is not https */
export function TextLink({ href, children }: LinkProps) {
  return (
    <Link href={requireMailLink(href)} className="link" style={{ color: light.teal, textDecorationLine: 'underline' }}>
      {children}
    </Link>
  );
}
