/** The application draws its own icons; the component library only looks whether these exist. */
export default function NoIcon() {
  return null;
}
