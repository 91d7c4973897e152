"""Reads a DXF with ezdxf and prints what it holds as JSON: audit, unit, and every polyline by layer."""

import json
import sys

import ezdxf

document = ezdxf.readfile(sys.argv[1])
audit = document.audit()
print(
    json.dumps(
        {
            "version": document.dxfversion,
            "unit": document.header["$INSUNITS"],
            "errors": [error.message for error in audit.errors],
            "fixes": [fix.message for fix in audit.fixes],
            "layers": [layer.dxf.name for layer in document.layers],
            "polylines": [
                {
                    "layer": polyline.dxf.layer,
                    "closed": polyline.closed,
                    "points": [list(point) for point in polyline.get_points("xyb")],
                }
                for polyline in document.modelspace().query("LWPOLYLINE")
            ],
            "entities": len(document.modelspace()),
        }
    )
)
