import type { Href } from 'expo-router';
import { useEffect, useRef, type ReactNode } from 'react';
import { StyleSheet, View, type Text as NativeText } from 'react-native';
import { color, space, useLayout } from '../theme';
import { Link } from './Link';
import { Lead, Quiet, Text } from './Text';
import { useArrivalFocus } from './useArrivalFocus';

export interface PageHeadProps {
  title: string;
  /** The document's title when it has to say more than the heading does. */
  documentTitle?: string;
  /** The place above this one. */
  back?: { href: Href; label: string };
  /** One sentence: what this page holds, with its numbers. */
  sub?: ReactNode;
  /** A short remark at the upper right: "saved on this phone". */
  note?: string;
  actions?: ReactNode;
  /** Between the back link and the title, such as Steps. */
  above?: ReactNode;
  /** The rule below; on by default. */
  isRuled?: boolean;
}

/** Opens every page: names it in the document's title and takes the focus when the page is reached from another. */
export function PageHead({
  title,
  documentTitle,
  back,
  sub,
  note,
  actions,
  above,
  isRuled = true,
}: PageHeadProps) {
  const { isPhone } = useLayout();
  const heading = useRef<NativeText>(null);
  useArrivalFocus(heading);

  useEffect(() => {
    if (typeof document !== 'undefined') document.title = `${documentTitle ?? title} · Ebbline`;
  }, [documentTitle, title]);

  return (
    <View style={[styles.head, isRuled && styles.ruled]}>
      {(back || note) && (
        <View style={styles.top}>
          {back ? (
            <Link href={back.href} size="small" tone="quiet" bare description={`Back to ${back.label}`}>
              {`‹ ${back.label}`}
            </Link>
          ) : (
            <View />
          )}
          {note && <Quiet aria-live="polite">{note}</Quiet>}
        </View>
      )}
      {above && <View style={styles.above}>{above}</View>}
      <View style={styles.row}>
        <View style={styles.words}>
          <Text
            ref={heading}
            role="heading"
            aria-level={1}
            tabIndex={-1}
            size={isPhone ? 'title' : 'readout'}
            weight="bold"
            style={styles.title}
          >
            {title}
          </Text>
          {typeof sub === 'string' ? <Lead size={isPhone ? 'body' : 'lead'}>{sub}</Lead> : sub}
        </View>
        {actions && <View style={styles.actions}>{actions}</View>}
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  head: { gap: space.s, paddingBottom: space.l },
  ruled: { borderBottomWidth: 2, borderBottomColor: color.ink },
  top: {
    flexDirection: 'row',
    justifyContent: 'space-between',
    alignItems: 'center',
    gap: space.m,
    minHeight: 24,
  },
  row: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    alignItems: 'flex-end',
    justifyContent: 'space-between',
    gap: space.m,
  },
  words: { flexShrink: 1, minWidth: 0, gap: space.xs },
  title: { letterSpacing: -0.6 },
  above: { paddingBottom: space.m },
  actions: { flexDirection: 'row', flexWrap: 'wrap', alignItems: 'center', gap: space.m },
});
