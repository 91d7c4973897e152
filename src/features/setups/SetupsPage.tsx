export default function SetupsPage() {
  return null
}
