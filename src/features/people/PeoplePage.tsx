export default function PeoplePage() {
  return null
}
