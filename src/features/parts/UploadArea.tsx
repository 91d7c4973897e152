import { useEffect, useRef, useState } from 'react'
import { uploadDrawing, type DrawingRead } from '../../api/drawings.ts'
import { Button } from '../../ui/Button.tsx'
import { RefusedDrawing } from './RefusedDrawing.tsx'

interface UploadAreaProps {
  readonly onRead: (read: DrawingRead) => void
}

interface Running {
  readonly fileName: string
  readonly share: number
}

/** Where a DXF is dropped or chosen; shows what has been sent and what was refused and why. */
export function UploadArea({ onRead }: UploadAreaProps) {
  const input = useRef<HTMLInputElement>(null)
  const stop = useRef<AbortController | null>(null)
  const [running, setRunning] = useState<Running | null>(null)
  const [failure, setFailure] = useState<{ fileName: string; error: unknown } | null>(null)
  const [over, setOver] = useState(false)
  useEffect(() => () => stop.current?.abort(), [])

  async function take(files: FileList | null) {
    const file = files?.[0]
    if (file === undefined || running !== null) return
    const controller = new AbortController()
    stop.current = controller
    setFailure(null)
    setRunning({ fileName: file.name, share: 0 })
    try {
      const onProgress = (share: number) => setRunning({ fileName: file.name, share })
      onRead(await uploadDrawing({ file, onProgress, signal: controller.signal }))
    } catch (error) {
      if (!controller.signal.aborted) setFailure({ fileName: file.name, error })
    } finally {
      setRunning(null)
      if (input.current !== null) input.current.value = ''
    }
  }

  return (
    <>
      {failure !== null && <RefusedDrawing {...failure} />}
      <div
        onDragOver={(event) => {
          event.preventDefault()
          setOver(true)
        }}
        onDragLeave={() => setOver(false)}
        onDrop={(event) => {
          event.preventDefault()
          setOver(false)
          void take(event.dataTransfer.files)
        }}
        className={`border-2 border-dashed px-6 py-12 flex flex-col items-center gap-4 text-center bg-panel ${over ? 'border-select' : 'border-muted'}`}
      >
        {running === null ? (
          <>
            <p className="text-large">{over ? 'Let go to read it' : 'Drop a DXF drawing here'}</p>
            <p className="text-muted">or</p>
            <Button look="main" size="glove" onClick={() => input.current?.click()}>
              Choose a file
            </Button>
          </>
        ) : (
          <Progress {...running} onStop={() => stop.current?.abort()} />
        )}
        <input
          ref={input}
          type="file"
          accept=".dxf,application/dxf,image/vnd.dxf"
          aria-label="DXF drawing"
          tabIndex={-1}
          className="sr-only"
          onChange={(event) => void take(event.target.files)}
        />
      </div>
    </>
  )
}

function Progress({ fileName, share, onStop }: Running & { onStop: () => void }) {
  const percent = Math.round(share * 100)
  return (
    <div className="w-full max-w-md flex flex-col gap-3" role="status">
      <p className="break-all">
        {percent < 100 ? `Sending ${fileName}: ${percent} %` : `Reading ${fileName}…`}
      </p>
      <progress className="w-full accent-select" max={100} value={percent < 100 ? percent : undefined}>
        {percent} %
      </progress>
      <Button onClick={onStop} className="self-center">
        Stop
      </Button>
    </div>
  )
}
