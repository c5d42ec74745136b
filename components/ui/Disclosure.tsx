import { useId, useState, type ReactNode } from 'react';
import { Pressable, StyleSheet, View } from 'react-native';
import { color, radius, space } from '../theme';
import { Text } from './Text';

export interface DisclosureProps {
  label: string;
  children: ReactNode;
  startsOpen?: boolean;
  /** For one that is opened from elsewhere too, such as by an error in it. */
  open?: { isOpen: boolean; onToggle: (isOpen: boolean) => void };
}

/** Words that open something below them, such as "How this was computed". Its matter is built when first opened. */
export function Disclosure({ label, children, startsOpen = false, open }: DisclosureProps) {
  const [isOwnOpen, setIsOwnOpen] = useState(startsOpen);
  const { isOpen, onToggle } = open ?? { isOpen: isOwnOpen, onToggle: setIsOwnOpen };
  const id = useId();
  return (
    <View>
      <Pressable
        role="button"
        aria-expanded={isOpen}
        aria-controls={isOpen ? id : undefined}
        onPress={() => onToggle(!isOpen)}
        style={styles.button}
      >
        <Text tone="tide" weight="strong">
          {label}
        </Text>
        <Text tone="tide" aria-hidden>
          {isOpen ? '−' : '+'}
        </Text>
      </Pressable>
      {isOpen && (
        <View id={id} style={styles.body}>
          {children}
        </View>
      )}
    </View>
  );
}

const styles = StyleSheet.create({
  button: {
    flexDirection: 'row',
    gap: space.s,
    minHeight: 36,
    alignItems: 'center',
    alignSelf: 'flex-start',
    borderRadius: radius.small,
  },
  body: {
    gap: space.m,
    paddingLeft: space.l,
    paddingVertical: space.s,
    borderLeftWidth: 2,
    borderLeftColor: color.line,
  },
});
