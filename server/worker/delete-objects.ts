import type { Handler } from './handler';

export const deleteObjects: Handler<'objects.delete'> = async ({ prefixes }, { platform }) => {
  for (const prefix of prefixes)
    await platform.store.deletePrefix(prefix.endsWith('/') ? prefix : `${prefix}/`);
  return null;
};
