import { type Ref, useEffect, useImperativeHandle, useRef } from 'react';
import type { View } from 'react-native';

import { useLayout } from '@/components/theme';
import { Button, FieldFrame, Progress, Row, Stack, Text } from '@/components/ui';
import { useRemovePhoto } from '@/lib/client/photos';

import { fileSize } from './fileSize';
import { PhotoView } from './PhotoView';
import { useSendPhoto } from './useSendPhoto';

interface PhotoFieldProps {
  bankId: string;
  /** Id of the photo; null without one. */
  value: string | null;
  onChange: (photoId: string | null) => void;
  /** What the form has to say of it. */
  error?: string;
  ref?: Ref<{ focus: () => void }>;
}

/** Phones that keep another kind hand one of these over. */
const accept = 'image/jpeg,image/png,image/webp';
const hint =
  'Up to 20 MB. Only you and moderators can open it. The place, the time and whatever else a camera writes beside a picture is taken out.';

/** Takes or picks a photo of the meter, sends it, and shows what is kept of it. */
export function PhotoField({ bankId, value, onChange, error, ref }: PhotoFieldProps) {
  const { isPhone } = useLayout();
  const [camera, picker] = [useRef<HTMLInputElement>(null), useRef<HTMLInputElement>(null)];
  const main = useRef<View>(null);
  const removePhoto = useRemovePhoto();
  const { file, sent, isSending, problem, send, stop, keptPhoto, forgetKept } = useSendPhoto(
    bankId,
    onChange,
  );
  useImperativeHandle(ref, () => ({ focus: () => main.current?.focus() }), []);
  useRefocus(main, isSending, value);

  const remove = (photoId: string) => {
    // One that a check was sent in with stays with that check; out of the form it is either way.
    removePhoto.mutate(photoId);
    onChange(null);
  };
  const pick = () => picker.current?.click();

  return (
    <FieldFrame label="Photo of the meter" hint={hint} error={problem?.text ?? error} optional isGroup>
      {({ labelId, describedBy }) => (
        <div role="group" aria-labelledby={labelId} aria-describedby={describedBy}>
          {isSending && file ? (
            <SendingPhoto file={file} sent={sent} onStop={stop} />
          ) : value === null && keptPhoto ? (
            <Stack gap="s">
              <Text>{`No connection. ${keptPhoto.name} is kept on this device and goes with the check.`}</Text>
              <Row>
                <Button ref={main} label="Use another" onPress={pick} />
                <Button kind="quiet" label="Remove" description="Remove the photo" onPress={forgetKept} />
              </Row>
            </Stack>
          ) : value === null ? (
            <Row>
              {isPhone && (
                <Button icon="camera" label="Take a photo" onPress={() => camera.current?.click()} />
              )}
              <Button ref={main} icon="upload" label="Choose a picture" onPress={pick} />
              {problem && !problem.isOfFile && file && (
                <Button kind="quiet" label={`Send ${file.name} again`} onPress={() => send(file)} />
              )}
            </Row>
          ) : (
            <Stack gap="s">
              <PhotoView photoId={value} />
              <Row>
                <Button ref={main} label="Use another" onPress={pick} />
                <Button
                  kind="quiet"
                  label="Remove"
                  description="Remove the photo"
                  onPress={() => remove(value)}
                />
              </Row>
            </Stack>
          )}
          <HiddenInput ref={camera} onFile={send} label="Take a photo of the meter" isCamera />
          <HiddenInput ref={picker} onFile={send} label="Choose a picture of the meter" />
        </div>
      )}
    </FieldFrame>
  );
}

/** Buttons give way to each other here: whoever stood on one stands on the next. */
function useRefocus(main: { current: View | null }, isSending: boolean, value: string | null) {
  const before = useRef({ isSending, value });
  useEffect(() => {
    const { isSending: wasSending, value: previous } = before.current;
    before.current = { isSending, value };
    const isNew = wasSending !== isSending || previous !== value;
    const isLost = typeof document !== 'undefined' && document.activeElement === document.body;
    if (isNew && isLost) main.current?.focus();
  }, [main, isSending, value]);
}

function SendingPhoto({ file, sent, onStop }: { file: File; sent: number; onStop: () => void }) {
  const isOnItsWay = sent < 1;
  return (
    <Stack gap="s">
      <Progress
        label={`Sending ${file.name}`}
        fraction={isOnItsWay ? sent : undefined}
        detail={
          isOnItsWay
            ? `${fileSize(sent * file.size)} of ${fileSize(file.size)}`
            : 'It has arrived and is being prepared.'
        }
      />
      <Button kind="quiet" label="Stop" onPress={onStop} />
    </Stack>
  );
}

interface HiddenInputProps {
  label: string;
  onFile: (file: File) => void;
  /** Opens the camera at the back, where there is one. */
  isCamera?: boolean;
  ref: Ref<HTMLInputElement>;
}

function HiddenInput({ label, onFile, isCamera = false, ref }: HiddenInputProps) {
  return (
    <input
      ref={ref}
      type="file"
      accept={accept}
      capture={isCamera ? 'environment' : undefined}
      hidden
      aria-label={label}
      onChange={({ target }) => {
        const file = target.files?.[0];
        // The same file may be picked again after it failed.
        target.value = '';
        if (file) onFile(file);
      }}
    />
  );
}
