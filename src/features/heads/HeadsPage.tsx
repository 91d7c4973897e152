export default function HeadsPage() {
  return null
}
