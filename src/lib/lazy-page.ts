const KEY = 'witness-mark-reloaded';

/**
 * Loads a page's chunk. After a deploy the old chunk is gone: the page is then loaded anew, once, so that a
 * server that is really broken shows its error instead of a loop.
 */
export async function lazyPage<Module>(load: () => Promise<Module>): Promise<Module> {
  try {
    const module = await load();
    sessionStorage.removeItem(KEY);
    return module;
  } catch (error) {
    if (sessionStorage.getItem(KEY)) throw error;
    sessionStorage.setItem(KEY, '1');
    location.reload();
    return new Promise(() => undefined);
  }
}
