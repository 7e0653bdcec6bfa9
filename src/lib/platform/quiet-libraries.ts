/** What libraries say about themselves on the web and nobody here can mend; a real warning must stand out. */
const KNOWN = ['Animated: `useNativeDriver`', 'props.pointerEvents is deprecated', '"shadow*" style props'];

export function quietLibraries(): void {
  const warn = console.warn;
  console.warn = (...words: unknown[]) => {
    if (!KNOWN.some((start) => String(words[0]).startsWith(start))) warn(...words);
  };
}
