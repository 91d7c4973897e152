export default function AccountPage() {
  return null
}
