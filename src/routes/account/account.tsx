import { signOut, signOutEverywhere } from '#shared/api/accounts.ts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { ErrorPanel } from '../../app/error-panel.tsx';
import { usePageTitle } from '../../app/page-title.ts';
import { useUser } from '../../app/require-session.tsx';
import { replaceSession, visitorSession } from '../../app/session-query.ts';
import { Page } from '../../app/shell.tsx';
import { Button } from '../../ui/button.tsx';
import { AlertDialog } from '../../ui/dialog.tsx';
import { PageHeader } from '../../ui/page-header.tsx';
import { Panel } from '../../ui/panel.tsx';
import { ThemeSwitch } from '../../ui/theme-switch.tsx';
import { ChangeAddress } from './change-address.tsx';
import { ChangePassword } from './change-password.tsx';

/** Ends this session, or all of them, and leaves for the front page. */
function useLeave(endpoint: typeof signOut | typeof signOutEverywhere) {
  const client = useQueryClient();
  const navigate = useNavigate();
  return useMutation({
    mutationFn: () => call(endpoint, {}),
    onSuccess: async () => {
      // The page first, the session second: otherwise this page would send the person to sign in.
      await navigate('/');
      replaceSession(client, visitorSession);
    },
  });
}

/** `/account`: who I am here, and how I sign in and out. */
export function AccountPage() {
  usePageTitle('Account');
  const user = useUser();
  const leave = useLeave(signOut);
  const leaveEverywhere = useLeave(signOutEverywhere);
  const [asking, setAsking] = useState(false);
  return (
    <Page>
      <PageHeader
        title={user.name}
        meta={user.email}
        actions={
          <Button
            busy={leave.isPending}
            onClick={() => {
              leave.mutate();
            }}
          >
            Sign out
          </Button>
        }
      />
      {leave.isError && <ErrorPanel error={leave.error} />}
      <div className="grid items-start gap-6 lg:grid-cols-2">
        <Panel title="Password" lead="Changing it signs out every other device.">
          <ChangePassword />
        </Panel>
        <Panel title="E-mail address" lead="The new one counts once you open the link sent there.">
          <ChangeAddress />
        </Panel>
        <Panel
          title="Signed in elsewhere"
          lead="A studio computer, a borrowed laptop, a lost phone."
        >
          {leaveEverywhere.isError && <ErrorPanel error={leaveEverywhere.error} />}
          <Button
            kind="danger"
            onClick={() => {
              setAsking(true);
            }}
          >
            Sign out everywhere
          </Button>
          <AlertDialog
            open={asking}
            onOpenChange={setAsking}
            title="Sign out everywhere?"
            description="Every browser and device that is signed in to this account is signed out, this one too. Nothing that is stored is lost."
            confirmWords="Sign out everywhere"
            cancelWords="Stay signed in"
            busy={leaveEverywhere.isPending}
            onConfirm={() => {
              leaveEverywhere.mutate();
              setAsking(false);
            }}
          />
        </Panel>
        <Panel title="Colours" lead="Remembered in this browser.">
          <ThemeSwitch />
        </Panel>
      </div>
    </Page>
  );
}
