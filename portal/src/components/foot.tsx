export function Foot({ title }: { title: string }) {
  return (
    <footer className="foot">
      <span>Soakstone · {title}</span>
      <span>contract v1</span>
      <span>times in UTC</span>
    </footer>
  )
}
