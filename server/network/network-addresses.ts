import { networkInterfaces } from 'node:os';

/** Interfaces that lead to containers and virtual machines; no phone is there. */
const virtual = /^(docker|br-|veth|virbr|vmnet|tun|tap)/;

/** This machine's IPv4 addresses on its networks, those of real interfaces first; empty without a network. */
export function networkAddresses(): string[] {
  const found = Object.entries(networkInterfaces()).flatMap(([name, addresses]) =>
    (addresses ?? [])
      .filter(({ family, internal }) => family === 'IPv4' && !internal)
      .map(({ address }) => ({ address, isVirtual: virtual.test(name) })),
  );
  return found.toSorted((a, b) => Number(a.isVirtual) - Number(b.isVirtual)).map(({ address }) => address);
}
