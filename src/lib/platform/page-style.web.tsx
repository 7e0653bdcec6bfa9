/**
 * The page scrolls as a whole, so that a browser's own search, zoom and scroll memory work; what has the focus
 * shows it; nothing moves for people who asked for that.
 */
export function PageStyle({ paper, focus, isDark }: { paper: string; focus: string; isDark: boolean }) {
  const rules = `
    html { background: ${paper}; color-scheme: ${isDark ? 'dark' : 'light'}; height: auto; min-height: 100%;
      -webkit-text-size-adjust: 100%; scroll-padding: 72px 0 96px; }
    body { background: ${paper}; height: auto; min-height: 100vh; overflow: visible; overflow-x: clip; }
    #root { height: auto; min-height: 100vh; }
    :focus-visible { outline: 2px solid ${focus} !important; outline-offset: 2px; border-radius: 6px; }
    input:focus-visible, textarea:focus-visible, main:focus { outline: none !important; }
    ::selection { background: ${focus}; color: ${paper}; }
    @media (prefers-reduced-motion: reduce) {
      *, *::before, *::after { animation-duration: 0.01ms !important; transition-duration: 0.01ms !important; }
    }`;
  return <style>{rules}</style>;
}
