import { MessagePage } from '@/components/shell/message-page';

export default function Forbidden() {
  return <MessagePage title="This is not part of your role"><p>If you hold another role at the school, change over to it in the menu under your name. If you need this screen, ask the owner.</p></MessagePage>;
}
