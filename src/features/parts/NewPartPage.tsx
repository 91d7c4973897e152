export default function NewPartPage() {
  return null
}
