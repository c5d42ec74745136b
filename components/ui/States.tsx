import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, space } from '../theme';
import { Button } from './Button';
import { Icon, type IconName } from './Icon';
import { Heading, Text } from './Text';

interface StateFrameProps {
  title: string;
  children: ReactNode;
  icon?: IconName;
  actions?: ReactNode;
  isAlert?: boolean;
}

function StateFrame({ title, children, icon, actions, isAlert = false }: StateFrameProps) {
  return (
    <View role={isAlert ? 'alert' : undefined} style={styles.box}>
      {icon && <Icon name={icon} size={28} tone="quiet" />}
      <Heading>{title}</Heading>
      {typeof children === 'string' ? <Text tone="quiet">{children}</Text> : children}
      {actions && <View style={styles.actions}>{actions}</View>}
    </View>
  );
}

/** What would be here, and how to add it. */
export function EmptyState({
  title,
  children,
  action,
}: {
  title: string;
  children: ReactNode;
  action?: ReactNode;
}) {
  return (
    <StateFrame title={title} actions={action}>
      {children}
    </StateFrame>
  );
}

export interface ErrorStateProps {
  title?: string;
  /** What happened and what to do. */
  children: ReactNode;
  onRetry?: () => void;
  isRetrying?: boolean;
  /** Given by the server with unexpected failures, for whoever asks for help. */
  requestId?: string;
}

export function ErrorState({
  title = 'This could not be loaded',
  children,
  onRetry,
  isRetrying,
  requestId,
}: ErrorStateProps) {
  return (
    <StateFrame
      title={title}
      icon="error"
      isAlert
      actions={onRetry && <Button label="Try again" onPress={onRetry} busy={isRetrying} />}
    >
      {typeof children === 'string' ? <Text tone="quiet">{children}</Text> : children}
      {requestId && (
        <Text size="small" tone="quiet">
          {`Reference for help: ${requestId}`}
        </Text>
      )}
    </StateFrame>
  );
}

export function OfflineState({ onRetry, isRetrying }: { onRetry?: () => void; isRetrying?: boolean }) {
  return (
    <StateFrame
      title="No connection"
      icon="offline"
      isAlert
      actions={onRetry && <Button label="Try again" onPress={onRetry} busy={isRetrying} />}
    >
      This page needs the exchange and it can not be reached. What you typed in forms is kept on this device.
    </StateFrame>
  );
}

const styles = StyleSheet.create({
  box: {
    gap: space.s,
    alignItems: 'flex-start',
    paddingVertical: space.xl,
    borderTopWidth: 1,
    borderBottomWidth: 1,
    borderColor: color.line,
    maxWidth: 640,
  },
  actions: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s, marginTop: space.s },
});
