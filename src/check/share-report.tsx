import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { createReportShare, listReportShares, revokeReportShare } from '#shared/api/reports.ts';
import { call } from '../app/api-client.ts';
import { ErrorPanel } from '../app/error-panel.tsx';
import { dayWords } from '../app/moments.ts';
import { Button } from '../ui/button.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { Field } from '../ui/field.tsx';
import { TextInput } from '../ui/text-input.tsx';
import { toastDone } from '../ui/toast.tsx';

type ShareReportProps = {
  reportId: string;
  open: boolean;
  onOpenChange: (open: boolean) => void;
};

/** Links with which anybody can read the report, and their end. */
export function ShareReport({ reportId, open, onOpenChange }: ShareReportProps) {
  const queries = useQueryClient();
  const queryKey = ['reports', reportId, 'shares'];
  const [link, setLink] = useState<string | null>(null);
  const shares = useQuery({
    queryKey,
    queryFn: ({ signal }) => call(listReportShares, { params: { reportId }, query: {} }, signal),
    enabled: open,
  });
  const refresh = () => queries.invalidateQueries({ queryKey });
  const make = useMutation({
    mutationFn: () => call(createReportShare, { params: { reportId }, body: {} }),
    onSuccess: ({ token }) => {
      setLink(`${location.origin}/shared-report#token=${token}`);
      return refresh();
    },
  });
  const revoke = useMutation({
    mutationFn: (shareId: string) => call(revokeReportShare, { params: { reportId, shareId } }),
    onSuccess: () => {
      setLink(null);
      return refresh();
    },
  });
  const failure = shares.error ?? make.error ?? revoke.error;
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Share this report"
      description="Whoever has the link can read the report, without an account, until you end the link. No sound is shared."
      actions={
        <Button kind="primary" busy={make.isPending} onClick={() => make.mutate()}>
          Make a link
        </Button>
      }
    >
      {failure && <ErrorPanel error={failure} />}
      {link !== null && (
        <Field label="The link" hint="It is shown this once. Copy it now.">
          {(control) => (
            <div className="flex gap-2">
              <TextInput
                {...control}
                readOnly
                value={link}
                onFocus={(event) => event.target.select()}
              />
              <Button
                onClick={() =>
                  void navigator.clipboard.writeText(link).then(() => toastDone('Link copied.'))
                }
              >
                Copy
              </Button>
            </div>
          )}
        </Field>
      )}
      <ul className="mt-4">
        {shares.data?.items.map(({ id, createdAt, expiresAt }) => (
          <li
            key={id}
            className="flex items-center justify-between gap-4 border-t border-line py-2 text-small"
          >
            <span>
              Made on {dayWords(createdAt)}, works until {dayWords(expiresAt)}
            </span>
            <Button size="small" kind="danger" onClick={() => revoke.mutate(id)}>
              End this link
            </Button>
          </li>
        ))}
      </ul>
      {shares.data?.items.length === 0 && link === null && (
        <p className="text-small text-ink-2">
          Nobody but the people of the project can read it so far.
        </p>
      )}
    </Dialog>
  );
}
