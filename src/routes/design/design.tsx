export function DesignPage() {
  return <p>…</p>;
}
