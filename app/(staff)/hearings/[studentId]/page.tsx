import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { EmptyState } from '@/components/ui/states';
import { hearingScreen } from '@/lib/ladder/server/hearing-screen';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { formatDate } from '@/lib/format';
import { HearingDesk } from './_components/hearing-desk';
import { JustDecided } from './_components/just-decided';

export const metadata = { title: 'Hearing' };

type Address = { params: Promise<{ studentId: string }>; searchParams: Promise<{ rung?: string }> };

export default async function HearingPage({ params, searchParams }: Address) {
  const context = await requireContextTo('read', 'Hearing');
  const [{ studentId }, { rung }] = [await params, await searchParams];
  const screen = await orNotFound(hearingScreen({ studentId, ...(rung ? { rungId: rung } : {}) }, context));
  if (!screen) return <><PageHeader title="Hearing" /><EmptyState title="The school has no ladder yet">The owner installs one on the Ladder page; then rungs can be heard.</EmptyState></>;
  const { lesson, lastAim, ladder } = screen;
  const { locale } = context.school;
  const where = [lesson ? `${formatDate(context.today, locale, 'weekday')} ${lesson.time}` : 'No lesson today', lesson?.roomName].filter(Boolean).join(', ');
  return (
    <>
      <PageHeader title={`${ladder.student.name}, hearing`} sub={`${where}.${lastAim ? ` Last time: ${lastAim}` : ''}`}
        actions={<ButtonLink href={`/students/${studentId}`}>Student</ButtonLink>} />
      {screen.justDecided.map((decided) => <JustDecided key={decided.id} decided={decided} />)}
      <HearingDesk key={`${screen.rung?.id ?? ''}:${screen.underWay?.id ?? ''}`} screen={screen} locale={locale} />
    </>
  );
}
