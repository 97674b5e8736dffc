import { once } from 'node:events';
import { type AddressInfo, createConnection, createServer, type Socket } from 'node:net';

export type DeadNetwork = { address: string; cut: () => void; mend: () => void; stop: () => Promise<void> };

/**
 * A way to the server that can go dead as a Wi-Fi does: nothing passes and nothing is closed, so that neither side is
 * told. What was under way when it was cut is lost.
 */
export async function deadNetwork(target: string): Promise<DeadNetwork> {
  const { hostname, port } = new URL(target);
  const pairs = new Set<[Socket, Socket]>();
  let isCut = false;
  const gate = createServer((near) => {
    const far = createConnection(Number(port), hostname);
    const pair: [Socket, Socket] = [near, far];
    pairs.add(pair);
    const end = () => {
      pairs.delete(pair);
      near.destroy();
      far.destroy();
    };
    const pass = (from: Socket, to: Socket) => {
      from.on('data', (bytes) => {
        if (!isCut && !to.destroyed) to.write(bytes);
      });
      from.on('close', () => (isCut ? undefined : end()));
      from.on('error', () => (isCut ? undefined : end()));
    };
    pass(near, far);
    pass(far, near);
  });
  gate.listen(0, '127.0.0.1');
  await once(gate, 'listening');
  return {
    address: `http://127.0.0.1:${(gate.address() as AddressInfo).port}`,
    cut: () => {
      isCut = true;
    },
    // Connections from before are beyond repair: bytes of theirs are missing.
    mend: () => {
      isCut = false;
      for (const [near, far] of pairs) {
        near.destroy();
        far.destroy();
      }
      pairs.clear();
    },
    stop: async () => {
      for (const [near, far] of pairs) {
        near.destroy();
        far.destroy();
      }
      gate.close();
      await once(gate, 'close');
    },
  };
}
