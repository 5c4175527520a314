/** The floor of the diary's client code: a page that shows nothing and brings nothing of its own. */
export default function EmptyPage() {
  return null;
}
