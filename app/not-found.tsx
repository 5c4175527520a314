import { MessagePage } from '@/components/shell/message-page';

/** The same page for what does not exist and for what is not yours. */
export default function NotFound() {
  return (
    <MessagePage title="There is nothing here for you">
      The address may be mistyped, or this page belongs to somebody else. What is yours is on your own page.
    </MessagePage>
  );
}
