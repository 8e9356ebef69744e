import { MessagePage } from '@/components/shell/message-page';

export default function NotFound() {
  return <MessagePage title="Nothing is here"><p>The address is wrong, or what it showed is not for you to see.</p></MessagePage>;
}
