import { useEffect, useRef, type ReactNode } from 'react';
import { Modal, Pressable, ScrollView, StyleSheet, View } from 'react-native';
import { breakpoint, color, radius, space, target, useLayout } from '../theme';
import { Icon } from './Icon';
import { Heading } from './Text';

export interface DialogProps {
  isOpen: boolean;
  onClose: () => void;
  title: string;
  children: ReactNode;
  /** Buttons at the foot; the safest first. */
  actions?: ReactNode;
  /** As wide as the page's content, for pictures. */
  wide?: boolean;
}

/**
 * A question over the page. The focus stays inside and goes back to where it was; Escape and the ground close it.
 * On phones it rises from the lower edge, within reach of the thumb.
 */
export function Dialog({ isOpen, onClose, title, children, actions, wide = false }: DialogProps) {
  const { isPhone } = useLayout();
  const opener = useRef<HTMLElement | null>(null);

  useEffect(() => {
    if (!isOpen || typeof document === 'undefined') return;
    opener.current = document.activeElement instanceof HTMLElement ? document.activeElement : null;
    return () => opener.current?.focus();
  }, [isOpen]);

  return (
    <Modal visible={isOpen} transparent animationType="none" onRequestClose={onClose} aria-label={title}>
      <View style={[styles.place, isPhone && styles.placePhone]}>
        <Pressable aria-hidden tabIndex={-1} onPress={onClose} style={styles.shade} />
        <View
          dataSet={{ look: 'rise' }}
          style={[styles.box, wide && styles.boxWide, isPhone && styles.boxPhone]}
        >
          <View style={styles.head}>
            <Heading style={styles.title}>{title}</Heading>
            <Pressable role="button" aria-label="Close" onPress={onClose} style={styles.close}>
              <Icon name="close" />
            </Pressable>
          </View>
          <ScrollView style={styles.scroll} contentContainerStyle={styles.body}>
            {children}
          </ScrollView>
          {actions && <View style={styles.actions}>{actions}</View>}
        </View>
      </View>
    </Modal>
  );
}

const styles = StyleSheet.create({
  place: { flex: 1, alignItems: 'center', justifyContent: 'center', padding: space.xl },
  placePhone: { justifyContent: 'flex-end', padding: 0 },
  shade: { position: 'absolute', left: 0, right: 0, top: 0, bottom: 0, backgroundColor: color.shade },
  box: {
    width: '100%',
    maxWidth: 520,
    maxHeight: '90%',
    backgroundColor: color.surface,
    borderRadius: radius.control,
    borderWidth: 1,
    borderColor: color.line,
  },
  boxWide: { maxWidth: breakpoint.content },
  boxPhone: { maxWidth: '100%', borderBottomLeftRadius: 0, borderBottomRightRadius: 0 },
  head: {
    flexDirection: 'row',
    alignItems: 'flex-start',
    paddingLeft: space.xl,
    paddingTop: space.m,
    paddingRight: space.s,
  },
  title: { flex: 1, paddingTop: space.s },
  close: {
    width: target,
    height: target,
    alignItems: 'center',
    justifyContent: 'center',
    borderRadius: radius.control,
  },
  scroll: { flexGrow: 0, flexShrink: 1 },
  body: { paddingHorizontal: space.xl, paddingTop: space.s, paddingBottom: space.xl, gap: space.l },
  actions: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    justifyContent: 'flex-end',
    gap: space.s,
    padding: space.l,
    borderTopWidth: 1,
    borderTopColor: color.line,
  },
});
