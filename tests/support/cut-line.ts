import { connect, createServer, type AddressInfo, type Server, type Socket } from 'node:net'

/** A line to a server that can be cut as a network is cut: for pages, for service workers, in the middle of an answer. */
export interface CutLine {
  readonly url: string
  readonly cut: () => Promise<void>
  readonly mend: () => Promise<void>
}

export async function cutLineTo(url: string): Promise<CutLine> {
  const { hostname, port } = new URL(url)
  const sockets = new Set<Socket>()
  const keep = (socket: Socket) => {
    sockets.add(socket)
    socket.on('close', () => sockets.delete(socket)).on('error', () => socket.destroy())
  }
  const made = (): Server => createServer((from) => {
    const to = connect(Number(port), hostname)
    keep(from)
    keep(to)
    from.pipe(to).pipe(from)
    from.on('close', () => to.destroy())
    to.on('close', () => from.destroy())
  })
  const listening = (server: Server, at: number) => new Promise<number>((resolve, reject) => {
    server.on('error', reject).listen(at, '127.0.0.1', () => resolve((server.address() as AddressInfo).port))
  })
  let server = made()
  const own = await listening(server, 0)
  return {
    url: `http://127.0.0.1:${own}`,
    cut: () => new Promise((resolve) => {
      server.close(() => resolve())
      for (const socket of sockets) socket.destroy()
    }),
    mend: async () => {
      server = made()
      await listening(server, own)
    },
  }
}
