import { createContext, useCallback, useContext, useEffect, useMemo, useState, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, radius, space } from '../theme';
import { Button } from './Button';
import { Text } from './Text';

interface ToastMessage {
  text: string;
  /** Something to do about it, such as taking it back. */
  action?: { label: string; onPress: () => void };
}

const ToastContext = createContext<(message: ToastMessage) => void>(() => {});
const shownMs = 7000;

/** Shows a short message of something done; it goes by itself, so nothing that must be read stands in one. */
export function useToast() {
  return useContext(ToastContext);
}

export function ToastProvider({ children }: { children: ReactNode }) {
  const [message, setMessage] = useState<ToastMessage | null>(null);
  const close = useCallback(() => setMessage(null), []);
  const show = useMemo(() => (next: ToastMessage) => setMessage({ ...next }), []);

  useEffect(() => {
    if (!message) return;
    const timer = setTimeout(close, shownMs);
    return () => clearTimeout(timer);
  }, [message, close]);

  return (
    <ToastContext value={show}>
      {children}
      <View role="status" aria-live="polite" style={styles.place} dataSet={{ screenOnly: '' }}>
        {message && (
          <View dataSet={{ look: 'rise' }} style={styles.box}>
            <Text style={styles.words}>{message.text}</Text>
            {message.action && (
              <Button
                kind="quiet"
                label={message.action.label}
                onPress={() => {
                  message.action?.onPress();
                  close();
                }}
              />
            )}
            <Button kind="quiet" label="Close" onPress={close} />
          </View>
        )}
      </View>
    </ToastContext>
  );
}

const styles = StyleSheet.create({
  place: {
    position: 'fixed',
    left: 0,
    right: 0,
    bottom: 84,
    alignItems: 'center',
    pointerEvents: 'box-none',
    zIndex: 20,
  },
  box: {
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.s,
    maxWidth: 560,
    marginHorizontal: space.l,
    paddingLeft: space.l,
    paddingRight: space.s,
    paddingVertical: space.xs,
    backgroundColor: color.surface,
    borderWidth: 1,
    borderColor: color.ink,
    borderRadius: radius.control,
  },
  words: { flexShrink: 1, paddingVertical: space.s },
});
