import { createSocket } from "node:dgram"
import type { AddressInfo } from "node:net"

/** A name server on loopback that answers each question for an IPv4 address with the next of a list. */
export async function startNameServer(answers: readonly string[]) {
  const socket = createSocket("udp4")
  let asked = 0
  socket.on("message", (question, from) => {
    const type = question.readUInt16BE(questionEnd(question) - 4)
    const address = type === 1 ? answers[Math.min(asked++, answers.length - 1)] : undefined
    socket.send(answerTo(question, address), from.port, from.address)
  })
  await new Promise<void>((resolve) => socket.bind(0, "127.0.0.1", resolve))
  return {
    port: (socket.address() as AddressInfo).port,
    /** Questions for an IPv4 address so far. */
    asked: () => asked,
    close: () => new Promise<void>((resolve) => socket.close(() => resolve())),
  }
}

/** @source RFC 1035, section 4.1: header of 12 bytes, the question, and a record that points back to its name */
function answerTo(question: Buffer, address: string | undefined): Buffer {
  const end = questionEnd(question)
  const head = Buffer.from(question.subarray(0, end))
  head.writeUInt16BE(0x8580, 2)
  head.writeUInt16BE(address ? 1 : 0, 6)
  head.writeUInt32BE(0, 8)
  if (!address) return head
  const record = Buffer.alloc(16)
  record.writeUInt16BE(0xc00c, 0)
  record.writeUInt16BE(1, 2)
  record.writeUInt16BE(1, 4)
  record.writeUInt32BE(0, 6)
  record.writeUInt16BE(4, 10)
  Buffer.from(address.split(".").map(Number)).copy(record, 12)
  return Buffer.concat([head, record])
}

/** Where the first question ends: after its labels, type and class. */
function questionEnd(message: Buffer): number {
  let at = 12
  while (message[at] !== 0) at += (message[at] ?? 0) + 1
  return at + 5
}
