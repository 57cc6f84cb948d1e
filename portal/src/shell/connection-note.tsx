import { useOfflineSince } from '../components/use-online.ts'

export function ConnectionNote() {
  const since = useOfflineSince()
  return (
    <div role="status">
      {since && (
        <p className="px-6 py-3 bg-frost-wash border-b-[1.5px] border-cut">
          <b>No connection since {since}.</b> You see what was read before; forms keep what you typed.
        </p>
      )}
    </div>
  )
}
