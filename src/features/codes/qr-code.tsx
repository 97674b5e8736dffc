/** A QR code that the server drew, shown as a picture, so that no markup of it becomes part of the page. */
export function QrCode({ svg, className }: { svg: string; className: string }) {
  return <img src={`data:image/svg+xml;charset=utf-8,${encodeURIComponent(svg)}`} alt="" className={className} />;
}
