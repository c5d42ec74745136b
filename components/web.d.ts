// Attributes that react-native-web hands on to the browser and the types of react-native leave out.
/// <reference types="expo/types" />
import 'react-native';
import type { WebKeyEvent } from './keyEvent';

declare module 'react-native' {
  interface AccessibilityProps {
    'aria-activedescendant'?: string;
    'aria-controls'?: string;
    'aria-current'?: 'page' | 'step' | 'true';
    'aria-describedby'?: string;
    'aria-haspopup'?: 'dialog' | 'listbox' | 'menu' | 'true';
    'aria-invalid'?: boolean;
    'aria-keyshortcuts'?: string;
    'aria-level'?: number;
    'aria-pressed'?: boolean;
    'aria-required'?: boolean;
    'aria-roledescription'?: string;
    'aria-atomic'?: boolean;
  }

  interface ViewProps {
    dataSet?: Record<string, string>;
    lang?: string;
    onKeyDown?: (event: WebKeyEvent) => void;
    onMouseLeave?: () => void;
    tabIndex?: 0 | -1;
  }

  interface TextProps {
    dataSet?: Record<string, string>;
  }

  interface PressableProps {
    dataSet?: Record<string, string>;
    onKeyDown?: (event: WebKeyEvent) => void;
    tabIndex?: 0 | -1;
  }

  interface TextInputProps {
    rows?: number;
  }
}
