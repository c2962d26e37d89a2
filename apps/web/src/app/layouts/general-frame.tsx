import type { ReactNode } from 'react';
import { AppShell } from '../../components/app-shell.js';
import { useAccount } from '../../features/account/hooks/use-account.js';
import { paths } from '../paths.js';
import { Tools } from './tools.js';

/** Frame of the pages outside projects. */
export function GeneralFrame({ children }: { children: ReactNode }) {
  const account = useAccount();
  const tabs = [
    { label: 'Projects', to: paths.projects() },
    ...(account.worksInLaboratory
      ? [
          { label: 'Instruments', to: paths.instruments() },
          { label: 'Measuring chains', to: paths.chains() },
        ]
      : []),
    ...(account.isAdministrator
      ? [
          { label: 'Laboratory', to: paths.laboratory() },
          { label: 'People', to: paths.people() },
          { label: 'Mailbox', to: paths.mailbox() },
        ]
      : []),
    { label: 'Account', to: paths.account() },
  ];
  return (
    <AppShell homeTo={paths.projects()} tabs={tabs} tabsLabel="Overtally" tools={<Tools account={account} />}>
      {children}
    </AppShell>
  );
}
