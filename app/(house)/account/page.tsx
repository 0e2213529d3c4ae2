import type { Metadata } from 'next';
import { ChangePasswordForm } from '@/components/account/change-password-form';
import { DefinitionList } from '@/components/ui/definition-list';
import { PageHeader } from '@/components/ui/page-header';
import { Section } from '@/components/ui/section';
import { ThemeChoice } from '@/components/account/theme-choice';
import { ROLE_NAMES } from '@/lib/domain/roles';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Your account' };

export default async function AccountPage() {
  const viewer = await pageViewer('account:own');
  return (
    <>
      <PageHeader title="Your account" />
      <div className="grid max-w-4xl gap-8 md:grid-cols-2">
        <Section title="You">
          <DefinitionList
            items={[
              ['Name', viewer.name],
              ['E-mail', viewer.email],
              ['Roles', viewer.roles.map((role) => ROLE_NAMES[role]).join(', ')],
            ]}
          />
          <div className="mt-6">
            <ThemeChoice />
          </div>
        </Section>
        <Section title="Change your password">
          <ChangePasswordForm />
        </Section>
      </div>
    </>
  );
}
