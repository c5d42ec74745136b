import packageJson from '@/package.json';

/** Stands for what the fit computes; raised with every change that moves its numbers. */
const fitRevision = 'pooled.2';

/** Version of the code that a fit was made by. */
export const codeVersion = `${packageJson.version}+${fitRevision}`;
