import { Banner, Button } from '../ui';

interface RestoredDraftProps {
  onGoOn: () => void;
  onStartAnew: () => void;
}

/** Says that what was typed earlier is back, and lets it be dropped. */
export function RestoredDraft({ onGoOn, onStartAnew }: RestoredDraftProps) {
  return (
    <Banner
      kind="info"
      title="Taken up where you left off"
      actions={
        <>
          <Button label="Go on" onPress={onGoOn} />
          <Button kind="quiet" label="Start anew" onPress={onStartAnew} />
        </>
      }
    >
      What you typed earlier on this device is back in its fields.
    </Banner>
  );
}
