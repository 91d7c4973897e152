/** One look for the whole gallery: ink on paper, teal below, ochre for seams, two reds and blues for the jet. */
export const colours = {
  paper: '#fbfaf5',
  metal: '#e6e3d8',
  ink: '#1c2b33',
  soft: '#6d7a80',
  bottom: '#0a7d74',
  seam: '#b98300',
  jetTop: '#b0305c',
  jetBottom: '#4457c4',
  alarm: '#d3301f',
  way: '#4c8a1f',
} as const

export const css = `
text { font: 15px "DejaVu Sans", "Liberation Sans", sans-serif; fill: ${colours.ink}; }
.title { font-size: 26px; font-weight: bold; }
.why { font-size: 17px; fill: ${colours.soft}; }
.head { font-weight: bold; }
.note { font-size: 13px; fill: ${colours.soft}; }
.order { font-size: 14px; font-weight: bold; fill: ${colours.jetTop}; }
.alarm { fill: ${colours.alarm}; }
polyline, line, path, circle, polygon { fill: none; stroke-width: 1; vector-effect: non-scaling-stroke; }
.metal { fill: ${colours.metal}; fill-rule: evenodd; stroke: none; }
.contour { stroke: ${colours.soft}; stroke-width: 0.5; stroke-opacity: 0.7; }
.contour.top { stroke: ${colours.ink}; stroke-width: 1.8; stroke-opacity: 1; }
.contour.bottom { stroke: ${colours.bottom}; stroke-width: 1.4; stroke-dasharray: 7 4; stroke-opacity: 1; }
.seam { stroke: ${colours.seam}; stroke-width: 1.1; }
.axis-top { stroke: ${colours.jetTop}; stroke-width: 0.9; }
.axis-bottom { stroke: ${colours.jetBottom}; stroke-width: 0.9; }
.lead { stroke-dasharray: 3 2; }
.kerf { stroke: ${colours.jetTop}; stroke-opacity: 0.1; vector-effect: none; stroke-linejoin: round; stroke-linecap: round; }
.pierce { stroke: ${colours.jetTop}; stroke-width: 1.4; fill: ${colours.paper}; }
.move { stroke: ${colours.jetTop}; stroke-width: 0.9; fill: ${colours.paper}; fill-opacity: 0.8; }
.event { stroke: ${colours.alarm}; stroke-width: 2; }
.bite { stroke: ${colours.alarm}; stroke-width: 1.2; }
.way { stroke: ${colours.way}; stroke-width: 2.4; }
.way-word { fill: ${colours.way}; font-weight: bold; }
.wall { stroke: ${colours.ink}; stroke-width: 1.8; }
.wall.blend { stroke: ${colours.bottom}; stroke-width: 1.4; stroke-dasharray: 7 4; }
.face { stroke: ${colours.soft}; stroke-width: 0.8; }
.side { stroke: ${colours.jetBottom}; stroke-width: 0.7; stroke-dasharray: 2 3; }
.jet { fill: ${colours.jetTop}; fill-opacity: 0.12; stroke: none; }
.glass { stroke: ${colours.soft}; stroke-width: 1; }
`
