type Opened = { ok: true } | { ok: false; message: string };

/** Presents a token or a code; on success this browser is signed in. */
export async function openDoor(presented: { token: string } | { code: string }): Promise<Opened> {
  try {
    const answer = await fetch('/api/auth/callback/email', {
      method: 'POST',
      headers: { 'Content-Type': 'application/json' },
      body: JSON.stringify(presented),
    });
    if (answer.ok) return { ok: true };
    const body: { message?: string } = await answer.json();
    return { ok: false, message: body.message ?? 'That did not work. Ask for a new link.' };
  } catch {
    return {
      ok: false,
      message: 'The shop cannot be reached just now. Check your connection and press the button again.',
    };
  }
}
