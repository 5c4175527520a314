'use client';

import { MessagePage } from '@/components/shell/message-page';
import { Button } from '@/components/ui/button';

export default function PageError({ reset }: { error: Error; reset: () => void }) {
  return (
    <MessagePage title="Something broke on our side" action={<Button onClick={reset}>Try again</Button>}>
      It has been written down for the shop. Nothing that was saved before is lost.
    </MessagePage>
  );
}
