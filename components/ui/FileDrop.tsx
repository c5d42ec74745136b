import { useId, useRef, useState, type CSSProperties } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, radius, space } from '../theme';
import { Button } from './Button';
import { Icon } from './Icon';
import { Row } from './Layout';
import { Progress } from './Progress';
import { Quiet, Text } from './Text';

export interface FileDropProps {
  label: string;
  /** What is accepted, in words: "CSV up to 64 MB". */
  hint: string;
  /** As in an input's accept: ".csv,text/csv". */
  accept: string;
  onFile?: (file: File) => void;
  /** In place of `onFile` where several can be taken at once. */
  onFiles?: (files: File[]) => void;
  /** Shown in place of the picker while a file is on its way. */
  progress?: { label: string; fraction?: number; detail?: string; onCancel?: () => void };
  error?: string;
  disabled?: boolean;
}

const zone = (isOver: boolean, isInvalid: boolean): CSSProperties => ({
  border: `1.5px dashed ${isInvalid ? color.rust : isOver ? color.tide : color.quiet}`,
  borderRadius: radius.control,
  background: isOver ? color.tideWash : color.surface,
  padding: space.xl,
});

/** Takes a file, or several where they are wanted, dropped on it or picked. */
export function FileDrop({
  label,
  hint,
  accept,
  onFile,
  onFiles,
  progress,
  error,
  disabled = false,
}: FileDropProps) {
  const [isOver, setIsOver] = useState(false);
  const input = useRef<HTMLInputElement>(null);
  const id = useId();

  const take = (files: FileList | null) => {
    const [file, ...others] = files ?? [];
    if (!file || disabled || progress) return;
    if (onFiles) onFiles([file, ...others]);
    else onFile?.(file);
  };

  return (
    <View style={styles.frame}>
      <div
        role="group"
        aria-label={label}
        aria-describedby={progress ? undefined : `${id}hint`}
        style={zone(isOver, Boolean(error))}
        onDragOver={(event) => {
          event.preventDefault();
          setIsOver(true);
        }}
        onDragLeave={() => setIsOver(false)}
        onDrop={(event) => {
          event.preventDefault();
          setIsOver(false);
          take(event.dataTransfer.files);
        }}
      >
        {progress ? (
          <View style={styles.progress}>
            <Progress label={progress.label} fraction={progress.fraction} detail={progress.detail} />
            {progress.onCancel && <Button kind="quiet" label="Stop" onPress={progress.onCancel} />}
          </View>
        ) : (
          <View style={styles.pick}>
            <Icon name="upload" size={24} tone="quiet" />
            <Text weight="strong">{label}</Text>
            <Row justify="center">
              <Button
                label="Choose a file"
                onPress={() => input.current?.click()}
                disabled={disabled}
                description={`Choose a file: ${label}`}
              />
            </Row>
            <Quiet nativeID={`${id}hint`}>{`${hint} Or drop it here.`}</Quiet>
          </View>
        )}
        <input
          ref={input}
          type="file"
          accept={accept}
          multiple={onFiles !== undefined}
          hidden
          aria-label={label}
          onChange={(event) => {
            take(event.target.files);
            // The same file may be picked again after it was corrected.
            event.target.value = '';
          }}
        />
      </div>
      {error && (
        <Text size="small" tone="rust" role="alert">
          {error}
        </Text>
      )}
    </View>
  );
}

const styles = StyleSheet.create({
  frame: { gap: 6 },
  pick: { gap: space.s, alignItems: 'center' },
  progress: { gap: space.s },
});
