export default function ApprovalsPage() {
  return null
}
