import sharp from "sharp";

/** A hall of 20 × 12 m at 50 pixels a metre, drawn for the test, with its outer wall 1 m from the paper's edge. */
export function hallPng(): Promise<Buffer> {
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="1100" height="700">
    <rect width="1100" height="700" fill="#fff"/>
    <rect x="50" y="50" width="1000" height="600" fill="none" stroke="#222" stroke-width="6"/>
    <path d="M550 50v250M550 400v250" stroke="#222" stroke-width="4"/>
  </svg>`;
  return sharp(Buffer.from(svg)).png().toBuffer();
}
