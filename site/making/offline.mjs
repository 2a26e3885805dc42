/**
 * Writes the service worker that keeps the whole site for use without a network.
 *
 *   node offline.mjs SITE_FOLDER
 *
 * It is the last step of a build: every file that is there goes in, and none may be added afterwards.
 */
import { generateSW } from "workbox-build";

const folder = process.argv[2];

const { count, size, warnings } = await generateSW({
  globDirectory: folder,
  globPatterns: ["**/*"],
  globIgnores: ["sw.js", "**/*.map", "sitemap.xml*"],
  swDest: `${folder}/sw.js`,
  // A file over the limit would be left out with a mere warning, and the site would not work offline.
  maximumFileSizeToCacheInBytes: 32 * 1024 * 1024,
  // These names change with their content, so that what the page has just fetched is not fetched again.
  dontCacheBustURLsMatching: /assets\/(pyodide-[\d.]+\/|engine-[0-9a-f]+\.zip$)/,
  // A new version waits for the user's word; until then the old one stays whole.
  skipWaiting: false,
  clientsClaim: true,
  cleanupOutdatedCaches: true,
  inlineWorkboxRuntime: true,
  sourcemap: false,
});

for (const warning of warnings) console.error(warning);
if (warnings.length > 0) process.exit(1);
console.log(`${count} files, ${(size / 1e6).toFixed(1)} MB`);
