import { createContext, type ReactNode } from 'react';

/** What stands in a page's place when the sign-in behind it has run out; given by the shell, which fetches it on demand. */
export const SignInAgainContext = createContext<ReactNode>(null);
