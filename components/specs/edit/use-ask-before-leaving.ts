import { useEffect } from 'react';

/** Has the browser ask before it closes or leaves a page that holds something unsaved. */
export function useAskBeforeLeaving(isUnsaved: boolean) {
  useEffect(() => {
    if (!isUnsaved) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [isUnsaved]);
}
