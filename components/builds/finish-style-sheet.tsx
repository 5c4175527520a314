'use client';

import { useInsertionEffect, useSyncExternalStore } from 'react';

const neverChanges = () => () => undefined;

/**
 * Rules that a content security policy without 'unsafe-inline' lets through. In the server's markup they are a `<style>` with the page's
 * nonce. Reached by a link the page keeps the policy, and so the nonce, of its first load, and a new `<style>` would be refused: in the
 * browser the rules are an adopted style sheet instead.
 */
export function FinishStyleSheet({ css, nonce }: { css: string; nonce?: string }) {
  const isServerMarkup = useSyncExternalStore(
    neverChanges,
    () => false,
    () => true,
  );
  useInsertionEffect(() => {
    const sheet = new CSSStyleSheet();
    sheet.replaceSync(css);
    document.adoptedStyleSheets.push(sheet);
    return () => {
      document.adoptedStyleSheets = document.adoptedStyleSheets.filter((adopted) => adopted !== sheet);
    };
  }, [css]);
  return isServerMarkup ? <style nonce={nonce}>{css}</style> : null;
}
