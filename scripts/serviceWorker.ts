import { generateSW } from 'workbox-build';

/**
 * Writes the service worker of an exported web app into its folder. It keeps the program, the fonts and the one page;
 * pages are asked of the network first, so that what the server puts into them is fresh, and come from what is kept where
 * there is none. Answers of the API never pass through it.
 */
export async function writeServiceWorker(folder: string): Promise<void> {
  const { warnings } = await generateSW({
    swDest: `${folder}/sw.js`,
    globDirectory: folder,
    globPatterns: [
      'index.html',
      'theme.js',
      'manifest.webmanifest',
      'icon*',
      'fonts/*.woff2',
      '_expo/**/*.{js,css}',
    ],
    // Expo puts a hash of what is in them into their names.
    dontCacheBustURLsMatching: /-[0-9a-f]{32}\./,
    maximumFileSizeToCacheInBytes: 8 * 1024 * 1024,
    // Pages, "/" among them, are offlinePages.js's.
    directoryIndex: null,
    cleanupOutdatedCaches: true,
    inlineWorkboxRuntime: true,
    sourcemap: false,
    mode: 'production',
    importScripts: ['/offlinePages.js'],
  });
  if (warnings.length > 0) throw new Error(`The service worker could not be written: ${warnings.join(' ')}`);
}
