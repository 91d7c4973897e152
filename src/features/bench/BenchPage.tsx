export default function BenchPage() {
  return null
}
