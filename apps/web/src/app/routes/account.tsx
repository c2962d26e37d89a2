import { PageHeader } from '../../components/page-header.js';
import { Section } from '../../components/section.js';
import { ThemeChoice } from '../../components/theme-choice.js';
import { AccessKeys } from '../../features/account/components/access-keys.js';
import { NameForm } from '../../features/account/components/name-form.js';
import { PasswordForm } from '../../features/account/components/password-form.js';
import { useAccount } from '../../features/account/hooks/use-account.js';
import { SignOutButton } from '../layouts/sign-out-button.js';

export function Component() {
  const account = useAccount();
  return (
    <>
      <PageHeader title="Account" subtitle={account.email} actions={<SignOutButton />} />
      <Section title="You">
        <NameForm account={account} />
      </Section>
      <Section title="Password">
        <PasswordForm />
      </Section>
      <AccessKeys />
      <Section title="Theme" lead="Kept in this browser.">
        <ThemeChoice />
      </Section>
    </>
  );
}
