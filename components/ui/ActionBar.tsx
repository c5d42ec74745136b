import { createContext, useContext, useEffect, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, space, useLayout } from '../theme';
import { pageFoot } from './Layout';

/** Told by the shell: a page's own actions take the place of the places while they are shown. */
export const ActionBarContext = createContext<(isShown: boolean) => void>(() => {});

/** The page's main action: at the thumb on phones, in place of the bottom bar; in the flow of the page otherwise. */
export function ActionBar({ children }: { children: ReactNode }) {
  const { isPhone } = useLayout();
  const tellShell = useContext(ActionBarContext);

  useEffect(() => {
    tellShell(true);
    return () => tellShell(false);
  }, [tellShell]);

  return <View style={isPhone ? styles.atThumb : styles.inFlow}>{children}</View>;
}

const styles = StyleSheet.create({
  atThumb: {
    position: 'sticky',
    bottom: 0,
    marginTop: 'auto',
    marginBottom: -pageFoot,
    marginHorizontal: -20,
    paddingHorizontal: 20,
    paddingVertical: space.m,
    gap: space.s,
    backgroundColor: color.surface,
    borderTopWidth: 1,
    borderTopColor: color.line,
    zIndex: 5,
  },
  inFlow: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s, paddingTop: space.s },
});
