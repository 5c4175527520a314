'use client';

import { useState } from 'react';

/** The floor of a key stroke in the spec: one controlled field, and its text written out once. */
export default function TypingPage() {
  const [text, setText] = useState('25.5');
  return (
    <>
      <input aria-label="Scale length" value={text} onChange={(event) => setText(event.target.value)} />
      <output>{text}</output>
    </>
  );
}
