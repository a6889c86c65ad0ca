import type { FeatureView } from '../../engine/index.ts';
import type { Settings, Source } from '../../session/index.ts';
import { keptFile } from '../storage.ts';
import { words } from '../words.ts';
import { workerClient } from '../workerClient.ts';

/**
 * The features with their candidates as nobody's verdicts have touched them: what was decided leaves only itself as a candidate. A thread of its own, so that what the desk
 * shows is not disturbed; empty when the browser does not hold the file.
 */
export async function weighFreely(source: Source, settings: Settings): Promise<readonly FeatureView[]> {
  const file = await keptFile(source).catch(() => undefined);
  if (!file) return [];
  const unheard = () => {};
  const client = workerClient(new URL('atomic.bin', document.baseURI).href, unheard, unheard, words.run.failed);
  try {
    await client.open(file, source.name, source.kind);
    return (await client.analyse(settings, [])).analysis.features;
  } finally {
    client.cancel();
  }
}
