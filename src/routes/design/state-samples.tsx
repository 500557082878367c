import { Button } from '../../ui/button.tsx';
import { Panel } from '../../ui/panel.tsx';
import { DoneNotice, EmptyState, ErrorNotice, LoadingState, Notice } from '../../ui/states.tsx';

/** What stands where the content is not, or not yet. */
export function StateSamples() {
  return (
    <div className="grid items-start gap-5 xl:grid-cols-2">
      <Panel title="Songs" lead="An empty list." flush>
        <EmptyState title="No songs yet." action={<Button size="small">Add a song</Button>}>
          A song holds the reports of its checks.
        </EmptyState>
      </Panel>
      <Panel title="Reports" lead="A list on its way.">
        <LoadingState words="Loading reports…" />
      </Panel>
      <ErrorNotice
        title="The server is not ready just now."
        requestId="019b1c2e-77aa-7c55-9e0e-1b2f0d3c4a5b"
        action={<Button size="small">Try again</Button>}
      >
        It usually comes back by itself. Try again in a minute.
      </ErrorNotice>
      <div className="flex flex-col gap-4">
        <Notice>The server judges two findings differently.</Notice>
        <DoneNotice>The zip is saved and verified.</DoneNotice>
      </div>
    </div>
  );
}
