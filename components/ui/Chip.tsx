import { StyleSheet, View } from 'react-native';
import { color, radius, space, type Color } from '../theme';
import { Text } from './Text';

type ChipTone = 'plain' | 'tide' | 'brass' | 'moss' | 'rust';

const tones: Record<ChipTone, Color> = {
  plain: 'quiet',
  tide: 'tide',
  brass: 'brass',
  moss: 'moss',
  rust: 'rust',
};

/** A short word in a frame. The word carries the meaning, the colour repeats it. */
export function Chip({ children, tone = 'plain' }: { children: string; tone?: ChipTone }) {
  return (
    <View style={[styles.box, { borderColor: color[tones[tone]] }]}>
      <Text size="small" weight="strong" tone={tones[tone]}>
        {children}
      </Text>
    </View>
  );
}

const severities = {
  fits: { tone: 'moss', word: 'fits' },
  look: { tone: 'brass', word: 'look' },
  doubtful: { tone: 'rust', word: 'doubtful' },
  repairable: { tone: 'rust', word: 'repairable' },
} as const satisfies Record<string, { tone: ChipTone; word: string }>;

export type FindingSeverity = keyof typeof severities;

/** How serious a finding of screening is. */
export function SeverityChip({ severity }: { severity: FindingSeverity }) {
  const { tone, word } = severities[severity];
  return <Chip tone={tone}>{word}</Chip>;
}

const checkStates = {
  draft: { tone: 'plain', word: 'draft' },
  submitted: { tone: 'tide', word: 'submitted' },
  sentBack: { tone: 'brass', word: 'sent back' },
  approved: { tone: 'moss', word: 'approved' },
  turnedAway: { tone: 'rust', word: 'turned away' },
  withdrawn: { tone: 'plain', word: 'withdrawn' },
  recalled: { tone: 'rust', word: 'recalled' },
} as const satisfies Record<string, { tone: ChipTone; word: string }>;

export type CheckStateName = keyof typeof checkStates;

/** Where a check stands on its way into the pool. */
export function CheckStateChip({ state }: { state: CheckStateName }) {
  const { tone, word } = checkStates[state];
  return <Chip tone={tone}>{word}</Chip>;
}

const styles = StyleSheet.create({
  box: {
    alignSelf: 'flex-start',
    borderWidth: 1,
    borderRadius: radius.small,
    paddingHorizontal: 6,
    paddingVertical: 1,
    marginVertical: space.hair,
    flexShrink: 0,
  },
});
