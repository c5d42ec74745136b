import { useState, type ReactNode } from 'react';
import { Pressable, StyleSheet, View } from 'react-native';
import { color, font, radius, size, space, useLayout } from '../theme';
import { Dialog } from './Dialog';
import { SentenceEditor } from './SentenceEditor';
import { Text } from './Text';

interface WordBase<Use, K extends keyof Use> {
  key: K;
  /** What the word stands for: "Depth of discharge". Titles the small editor. */
  label: string;
  /** Explains it in the editor. */
  hint?: string;
  /** The words in the sentence: "60 % deep". */
  show: (value: Use[K]) => string;
}

/** A word that is one of a few. */
export interface ChoiceWord<Use, K extends keyof Use> extends WordBase<Use, K> {
  options: readonly { value: Use[K]; label: string; hint?: string; disabled?: boolean }[];
}

/** A word that is a number, typed in its own unit. */
export interface NumberWord<Use, K extends keyof Use> extends WordBase<Use, K> {
  unit: string;
  /** Limits and step in the unit shown. */
  min: number;
  max: number;
  step: number;
  /** From the stored value to the number shown, and back. */
  toShown: (value: Use[K]) => number;
  fromShown: (shown: number) => Use[K];
}

type Word<Use> = { [K in keyof Use]: ChoiceWord<Use, K> | NumberWord<Use, K> }[keyof Use];

export type SentencePart<Use> = string | Word<Use>;

export interface SentenceUseProps<Use> {
  /** Words and editable words in turn: ['Cycled ', depth, ' at ', rate, '.']. */
  parts: readonly SentencePart<Use>[];
  value: Use;
  onChange: (value: Use) => void;
  /** Below the sentence: how many banks are used like this. */
  children?: ReactNode;
}

/** The use that a page is about, as a sentence; its underlined words open small editors. */
export function SentenceUse<Use>({ parts, value, onChange, children }: SentenceUseProps<Use>) {
  const { isPhone } = useLayout();
  const [open, setOpen] = useState<Word<Use> | null>(null);
  const textSize = isPhone ? size.lead : size.lead + 1;
  return (
    <View style={styles.frame}>
      <View role="group" aria-label="The use shown" style={styles.sentence}>
        {parts.flatMap((part, index) =>
          typeof part === 'string' ? (
            part.split(/(?<=\s)/).map((words, position) => (
              <Text key={`${index}.${position}`} style={[styles.plain, { fontSize: textSize }]}>
                {words.replace(/ $/, '\u00a0')}
              </Text>
            ))
          ) : (
            <Pressable
              key={String(part.key)}
              role="button"
              aria-haspopup="dialog"
              aria-label={`${part.label}: ${part.show(value[part.key])}. Change`}
              onPress={() => setOpen(part)}
              style={({ hovered }) => [styles.word, hovered && styles.wordHovered]}
            >
              <Text
                weight="strong"
                dataSet={{ look: 'editable' }}
                style={[styles.plain, { fontSize: textSize }]}
              >
                {part.show(value[part.key])}
              </Text>
            </Pressable>
          ),
        )}
      </View>
      {children}
      <Dialog isOpen={open !== null} onClose={() => setOpen(null)} title={open?.label ?? ''}>
        {open && (
          <SentenceEditor
            word={open}
            value={value[open.key]}
            onDone={(next) => {
              onChange({ ...value, [open.key]: next });
              setOpen(null);
            }}
          />
        )}
      </Dialog>
    </View>
  );
}

const styles = StyleSheet.create({
  frame: { gap: space.s },
  sentence: { flexDirection: 'row', flexWrap: 'wrap', alignItems: 'baseline' },
  plain: { fontFamily: font.words, lineHeight: 36 },
  word: { borderRadius: radius.small },
  wordHovered: { backgroundColor: color.tideWash },
});
