// Generated from the Go sources by build/contract. Do not edit.

import type { Catalogue } from "./contract";

export const catalogue: Catalogue = {
  "edition": "2026.1",
  "recordVersion": 1,
  "devices": [
    {
      "key": "D",
      "scale": "HLD",
      "range": [
        300,
        890
      ],
      "directions": [
        "down",
        "down45",
        "level",
        "up45",
        "up",
        "compensated"
      ],
      "curve": true,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "DC",
      "scale": "HLDC",
      "range": [
        300,
        890
      ],
      "directions": [
        "down",
        "down45",
        "level",
        "up45",
        "up",
        "compensated"
      ],
      "curve": true,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "DL",
      "scale": "HLDL",
      "range": [
        560,
        950
      ],
      "directions": [
        "down",
        "compensated"
      ],
      "curve": false,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "D+15",
      "scale": "HLD+15",
      "range": [
        330,
        890
      ],
      "directions": [
        "down",
        "compensated"
      ],
      "curve": true,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "S",
      "scale": "HLS",
      "range": [
        400,
        920
      ],
      "directions": [
        "down",
        "compensated"
      ],
      "curve": true,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "E",
      "scale": "HLE",
      "range": [
        300,
        920
      ],
      "directions": [
        "down",
        "compensated"
      ],
      "curve": true,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "C",
      "scale": "HLC",
      "range": [
        350,
        960
      ],
      "directions": [
        "down",
        "compensated"
      ],
      "curve": true,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "G",
      "scale": "HLG",
      "range": [
        300,
        750
      ],
      "directions": [
        "down",
        "compensated"
      ],
      "curve": true,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    }
  ],
  "directions": [
    {
      "key": "down",
      "source": ""
    },
    {
      "key": "down45",
      "source": "Impact-direction correction for devices D and DC, HL units to ADD to the mean of readings taken in that direction. GB/T 17394.1 annex, from memory: check against your own copy. Level = uncorrected mean; interpolate linearly between levels."
    },
    {
      "key": "level",
      "source": "Impact-direction correction for devices D and DC, HL units to ADD to the mean of readings taken in that direction. GB/T 17394.1 annex, from memory: check against your own copy. Level = uncorrected mean; interpolate linearly between levels."
    },
    {
      "key": "up45",
      "source": "Impact-direction correction for devices D and DC, HL units to ADD to the mean of readings taken in that direction. GB/T 17394.1 annex, from memory: check against your own copy. Level = uncorrected mean; interpolate linearly between levels."
    },
    {
      "key": "up",
      "source": "Impact-direction correction for devices D and DC, HL units to ADD to the mean of readings taken in that direction. GB/T 17394.1 annex, from memory: check against your own copy. Level = uncorrected mean; interpolate linearly between levels."
    },
    {
      "key": "compensated",
      "source": ""
    }
  ],
  "groups": [
    {
      "key": "low-alloy-steel",
      "name": "Carbon, low-alloy and cast steel",
      "range": [
        90,
        940
      ],
      "scales": [
        "HV",
        "HBW",
        "HRC",
        "HRB",
        "HRA",
        "HS",
        "Rm"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "tool-steel",
      "name": "Tool steel",
      "range": [
        150,
        940
      ],
      "scales": [
        "HV",
        "HBW",
        "HRC",
        "HRB",
        "HRA",
        "HS"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "martensitic-stainless",
      "name": "Martensitic and ferritic stainless steel",
      "range": [
        130,
        750
      ],
      "scales": [
        "HV",
        "HBW",
        "HRC",
        "HRB",
        "HRA",
        "HS"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "austenitic-stainless",
      "name": "Austenitic stainless steel",
      "range": [
        120,
        400
      ],
      "scales": [
        "HV",
        "HBW",
        "HRB"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "duplex-stainless",
      "name": "Duplex stainless steel",
      "range": [
        180,
        450
      ],
      "scales": [
        "HV",
        "HBW"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "grey-iron",
      "name": "Grey cast iron",
      "range": [
        90,
        350
      ],
      "scales": [
        "HV",
        "HBW"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "ductile-iron",
      "name": "Ductile (nodular) cast iron",
      "range": [
        120,
        450
      ],
      "scales": [
        "HV",
        "HBW"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "aluminium",
      "name": "Aluminium alloy",
      "range": [
        40,
        190
      ],
      "scales": [
        "HV",
        "HBW",
        "HRB"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "brass",
      "name": "Brass (copper-zinc)",
      "range": [
        45,
        200
      ],
      "scales": [
        "HV",
        "HBW",
        "HRB",
        "HRF"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "bronze",
      "name": "Bronze (tin or aluminium)",
      "range": [
        60,
        320
      ],
      "scales": [
        "HV",
        "HBW"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "copper",
      "name": "Copper",
      "range": [
        40,
        150
      ],
      "scales": [
        "HV",
        "HBW"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "nickel-alloy",
      "name": "Nickel and high-nickel alloy",
      "range": [
        80,
        520
      ],
      "scales": [
        "HV",
        "HBW",
        "HRC",
        "HRB",
        "HRA"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    },
    {
      "key": "titanium",
      "name": "Titanium alloy",
      "range": [
        120,
        420
      ],
      "scales": [
        "HV",
        "HBW"
      ],
      "source": "Material groups for the rebound model. density, E, nu: handbook values (ASM Handbook class), from memory. rate_factor, overstress_hv, return_rel: engineering estimates, see package rebound. u_hl_percent: standard uncertainty of the model, percent of HL."
    }
  ],
  "scales": [
    {
      "key": "HLD",
      "name": "Leeb hardness, device D",
      "min": 300,
      "max": 890,
      "decimals": 0,
      "step": 1,
      "leeb": true,
      "direct": false,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "HLDC",
      "name": "Leeb hardness, device DC",
      "min": 300,
      "max": 890,
      "decimals": 0,
      "step": 1,
      "leeb": true,
      "direct": false,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "HLDL",
      "name": "Leeb hardness, device DL",
      "min": 560,
      "max": 950,
      "decimals": 0,
      "step": 1,
      "leeb": true,
      "direct": false,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "HLD+15",
      "name": "Leeb hardness, device D+15",
      "min": 330,
      "max": 890,
      "decimals": 0,
      "step": 1,
      "leeb": true,
      "direct": false,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "HLS",
      "name": "Leeb hardness, device S",
      "min": 400,
      "max": 920,
      "decimals": 0,
      "step": 1,
      "leeb": true,
      "direct": false,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "HLE",
      "name": "Leeb hardness, device E",
      "min": 300,
      "max": 920,
      "decimals": 0,
      "step": 1,
      "leeb": true,
      "direct": false,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "HLC",
      "name": "Leeb hardness, device C",
      "min": 350,
      "max": 960,
      "decimals": 0,
      "step": 1,
      "leeb": true,
      "direct": false,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "HLG",
      "name": "Leeb hardness, device G",
      "min": 300,
      "max": 750,
      "decimals": 0,
      "step": 1,
      "leeb": true,
      "direct": false,
      "source": "Leeb impact devices. Energy, velocity, mass, ball and application range: ISO 16859-1; test-piece limits: ISO 16859-1, ASTM A956, GB/T 17394.1. Values from memory: check against your own copy of the standard. Blank = not sure or not given."
    },
    {
      "key": "HV",
      "name": "Vickers hardness",
      "min": null,
      "max": null,
      "decimals": 0,
      "step": 1,
      "leeb": false,
      "direct": true,
      "source": "Hardness scales: least and greatest value of the scale itself (ISO 6506-1, ISO 6508-1; blank: the conversion table sets it), places and step of a quoted value, step of a usual display (common practice, no source)."
    },
    {
      "key": "HBW",
      "name": "Brinell hardness",
      "min": null,
      "max": 650,
      "decimals": 0,
      "step": 1,
      "leeb": false,
      "direct": true,
      "source": "Hardness scales: least and greatest value of the scale itself (ISO 6506-1, ISO 6508-1; blank: the conversion table sets it), places and step of a quoted value, step of a usual display (common practice, no source)."
    },
    {
      "key": "HRC",
      "name": "Rockwell C hardness",
      "min": 20,
      "max": 70,
      "decimals": 1,
      "step": 0.1,
      "leeb": false,
      "direct": true,
      "source": "Hardness scales: least and greatest value of the scale itself (ISO 6506-1, ISO 6508-1; blank: the conversion table sets it), places and step of a quoted value, step of a usual display (common practice, no source)."
    },
    {
      "key": "HRB",
      "name": "Rockwell B hardness",
      "min": 55,
      "max": 100,
      "decimals": 1,
      "step": 0.1,
      "leeb": false,
      "direct": true,
      "source": "Hardness scales: least and greatest value of the scale itself (ISO 6506-1, ISO 6508-1; blank: the conversion table sets it), places and step of a quoted value, step of a usual display (common practice, no source)."
    },
    {
      "key": "HRA",
      "name": "Rockwell A hardness",
      "min": 20,
      "max": 95,
      "decimals": 1,
      "step": 0.1,
      "leeb": false,
      "direct": false,
      "source": "Hardness scales: least and greatest value of the scale itself (ISO 6506-1, ISO 6508-1; blank: the conversion table sets it), places and step of a quoted value, step of a usual display (common practice, no source)."
    },
    {
      "key": "HRF",
      "name": "Rockwell F hardness",
      "min": 60,
      "max": 100,
      "decimals": 1,
      "step": 0.1,
      "leeb": false,
      "direct": false,
      "source": "Hardness scales: least and greatest value of the scale itself (ISO 6506-1, ISO 6508-1; blank: the conversion table sets it), places and step of a quoted value, step of a usual display (common practice, no source)."
    },
    {
      "key": "HS",
      "name": "Shore scleroscope hardness",
      "min": null,
      "max": null,
      "decimals": 1,
      "step": 0.1,
      "leeb": false,
      "direct": false,
      "source": "Hardness scales: least and greatest value of the scale itself (ISO 6506-1, ISO 6508-1; blank: the conversion table sets it), places and step of a quoted value, step of a usual display (common practice, no source)."
    },
    {
      "key": "Rm",
      "name": "Tensile strength",
      "min": 255,
      "max": 2180,
      "decimals": 0,
      "step": 5,
      "leeb": false,
      "direct": false,
      "source": "Hardness scales: least and greatest value of the scale itself (ISO 6506-1, ISO 6508-1; blank: the conversion table sets it), places and step of a quoted value, step of a usual display (common practice, no source)."
    }
  ],
  "rules": [
    "guarded",
    "one-sided-95",
    "simple"
  ],
  "limits": [
    {
      "key": "sour-base",
      "text": "Sour service, carbon and low-alloy steel",
      "scale": "HRC",
      "min": null,
      "max": 22,
      "source": "ISO 15156-2 / NACE MR0175, from memory: check the edition your contract names"
    },
    {
      "key": "sour-weld",
      "text": "Sour service, weld procedure",
      "scale": "HV",
      "min": null,
      "max": 250,
      "source": "ISO 15156-2 / NACE MR0175, from memory: check the edition your contract names"
    },
    {
      "key": "refinery-weld",
      "text": "Refinery carbon steel weld deposit",
      "scale": "HBW",
      "min": null,
      "max": 200,
      "source": "NACE SP0472, from memory: check the edition your contract names"
    },
    {
      "key": "refinery-haz",
      "text": "Refinery heat-affected zone",
      "scale": "HV",
      "min": null,
      "max": 248,
      "source": "NACE SP0472 / MR0103, from memory: check the edition your contract names"
    },
    {
      "key": "weld-g12-aw",
      "text": "Weld procedure, steel groups 1 and 2, as welded",
      "scale": "HV",
      "min": null,
      "max": 380,
      "source": "EN ISO 15614-1, from memory: check the edition your contract names"
    },
    {
      "key": "weld-g12-ht",
      "text": "Weld procedure, steel groups 1 and 2, heat treated",
      "scale": "HV",
      "min": null,
      "max": 320,
      "source": "EN ISO 15614-1, from memory: check the edition your contract names"
    },
    {
      "key": "pwht-p3-p4",
      "text": "Piping after heat treatment, P-No. 3 and 4",
      "scale": "HBW",
      "min": null,
      "max": 225,
      "source": "ASME B31.3 (editions with a hardness column), from memory: check the edition your contract names"
    },
    {
      "key": "pwht-p5-p6",
      "text": "Piping after heat treatment, P-No. 5 and 6",
      "scale": "HBW",
      "min": null,
      "max": 241,
      "source": "ASME B31.3 (editions with a hardness column), from memory: check the edition your contract names"
    },
    {
      "key": "grade-91",
      "text": "Grade 91 base metal",
      "scale": "HBW",
      "min": 190,
      "max": 250,
      "source": "ASTM A335 / A213, from memory: check the edition your contract names"
    },
    {
      "key": "linepipe-sour",
      "text": "Line pipe for sour service",
      "scale": "HV",
      "min": null,
      "max": 250,
      "source": "API 5L Annex H, from memory: check the edition your contract names"
    },
    {
      "key": "bolt-b7",
      "text": "Bolting grade B7",
      "scale": "HBW",
      "min": null,
      "max": 321,
      "source": "ASTM A193, from memory: check the edition your contract names"
    },
    {
      "key": "bolt-b7m",
      "text": "Bolting grade B7M",
      "scale": "HBW",
      "min": null,
      "max": 235,
      "source": "ASTM A193, from memory: check the edition your contract names"
    }
  ]
};
