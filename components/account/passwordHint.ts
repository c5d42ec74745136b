import { limits } from '@/lib/contract/limits';

export const passwordHint = `At least ${limits.passwordLength.min} characters. A few words that nobody else would put together are good.`;
