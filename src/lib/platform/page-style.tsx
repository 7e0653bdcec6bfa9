/** Pages exist on the web alone. */
export function PageStyle(_props: { paper: string; focus: string; isDark: boolean }) {
  return null;
}
