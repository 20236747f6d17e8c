/** A worksheet file in an invented setting that uses every key of the format, in canonical form. */
export const EXAMPLE = `{
  "format": "levelwright-worksheet",
  "version": 1,
  "id": "6f1c2d3e-0000-4000-8000-000000000001",
  "title": "Harbour buoy uplink",
  "summary": "Invented.",
  "cases": [
    {
      "id": "calm",
      "name": "Calm"
    },
    {
      "id": "storm",
      "name": "Storm",
      "xColour": 3
    }
  ],
  "sections": [
    {
      "id": "tx",
      "kind": "lines",
      "title": "Transmitter",
      "lines": [
        {
          "id": "l1",
          "symbol": "P_tx",
          "label": "Transmit power",
          "entry": "14 dBm",
          "unit": "dBm",
          "quantity": "level",
          "side": "wanted",
          "byCase": {
            "storm": "13 dBm"
          },
          "digits": 1,
          "tolerance": {
            "favourable": "0.5 dB",
            "adverse": "1 dB",
            "below": "1 dB",
            "above": "0.5 dB",
            "shape": "triangular",
            "group": "supply"
          },
          "requirement": {
            "atLeast": "3 dBm"
          },
          "source": "data sheet",
          "note": "µ ≥ “quoted”\\n\\tsecond line",
          "accepted": [
            {
              "code": "loss-added",
              "entry": "14 dBm",
              "reason": "referred back to the antenna"
            }
          ],
          "signOff": [
            {
              "by": "A. Example",
              "on": "2026-11-03",
              "basis": "b1"
            }
          ],
          "xExtra": {
            "deep": [
              1,
              null,
              true
            ]
          }
        },
        {
          "id": "l2",
          "symbol": "",
          "label": "",
          "entry": ""
        }
      ],
      "xFolded": true
    },
    {
      "id": "rx",
      "kind": "chain",
      "symbol": "rx",
      "title": "Receiver",
      "signal": "P_ant",
      "noise": "T_ant",
      "bandwidth": "B",
      "intercept": "coherent",
      "stages": [
        {
          "id": "s1",
          "symbol": "lna",
          "label": "Low-noise amplifier",
          "gain": "15 dB",
          "noiseFigure": "0.8 dB",
          "outputIntercept": "30 dBm",
          "inputIntercept": "",
          "outputCompression": "18 dBm",
          "inputCompression": "",
          "temperature": "290 K",
          "byCase": {
            "storm": {
              "gain": "14.5 dB"
            }
          },
          "tolerance": {
            "gain": {
              "favourable": "0.5 dB",
              "adverse": "0.5 dB",
              "shape": "uniform"
            }
          }
        }
      ]
    },
    {
      "id": "imp",
      "kind": "pool",
      "symbol": "N_I",
      "title": "Noise and interference",
      "unit": "dBm",
      "lines": [
        {
          "id": "l3",
          "symbol": "I_1",
          "label": "Interferer",
          "entry": "-100 dBm"
        }
      ]
    },
    {
      "id": "scan",
      "kind": "curve",
      "symbol": "G_scan",
      "title": "Gain over scan angle",
      "x": {
        "label": "Scan angle",
        "unit": "deg"
      },
      "y": {
        "label": "Gain",
        "unit": "dBi",
        "quantity": "gain"
      },
      "points": [
        [
          0,
          32
        ],
        [
          10,
          31.6
        ]
      ]
    },
    {
      "id": "later",
      "kind": "waterfall",
      "title": "Not known yet",
      "anything": {}
    }
  ],
  "recorded": {
    "SINR": {
      "calm": "12.96 dB"
    }
  },
  "xTool": "another program"
}
`;

/** The example as plain data, fresh for each caller to change. */
export function exampleDocument(): Record<string, unknown> {
  return JSON.parse(EXAMPLE) as Record<string, unknown>;
}
