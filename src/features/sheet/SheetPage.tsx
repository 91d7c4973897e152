export default function SheetPage() {
  return null
}
