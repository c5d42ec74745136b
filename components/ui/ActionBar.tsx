import { createContext, useContext, useEffect, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, space, useLayout } from '../theme';
import { pageFoot } from './Layout';

/** Told by the shell: a page's own actions take the place of the places while they are shown. */
export const ActionBarContext = createContext<(isShown: boolean) => void>(() => {});

interface ActionBarProps {
  children: ReactNode;
  /**
   * Stays in sight while the page moves below it: for pages that are looked through. A form is gone through to its
   * end, where its bar stands, so that it never covers half of a field.
   */
  stays?: boolean;
}

/** The page's main action: on phones at the thumb, in place of the bottom bar; in the flow of the page otherwise. */
export function ActionBar({ children, stays = false }: ActionBarProps) {
  const { isPhone } = useLayout();
  const tellShell = useContext(ActionBarContext);

  useEffect(() => {
    tellShell(true);
    return () => tellShell(false);
  }, [tellShell]);

  return (
    // A press must not take the focus out of a field first: what the field then says moves the button away from under
    // the finger, and the press is lost.
    <div style={{ display: 'contents' }} onMouseDown={(event) => event.preventDefault()}>
      <View style={isPhone ? [styles.atFoot, stays && styles.staying] : styles.inFlow}>{children}</View>
    </div>
  );
}

const styles = StyleSheet.create({
  atFoot: {
    marginTop: 'auto',
    marginBottom: -pageFoot,
    marginHorizontal: -20,
    paddingHorizontal: 20,
    paddingVertical: space.m,
    gap: space.s,
    backgroundColor: color.surface,
    borderTopWidth: 1,
    borderTopColor: color.line,
  },
  staying: { position: 'sticky', bottom: 0, zIndex: 5 },
  inFlow: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s, paddingTop: space.s },
});
