export default function JointPage() {
  return null
}
