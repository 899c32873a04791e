/** A file name, without ending, that every system takes: from the title, or else from what else there is to say. */
export function fileStem(title: string, fallback: string): string {
  const plain = (text: string) =>
    text
      .normalize('NFKD')
      .toLowerCase()
      .replace(/[^a-z0-9+]+/g, '-')
      .replace(/^-+|-+$/g, '')
      .slice(0, 60);
  return plain(title) || plain(fallback) || 'study';
}
