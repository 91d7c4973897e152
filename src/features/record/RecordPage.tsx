export default function RecordPage() {
  return null
}
