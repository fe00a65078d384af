import type { NoticeFacts } from "@/lib/notices/notice-facts";

/** A request with invented figures, to be amended. */
export const REQUEST: NoticeFacts = {
  kind: "request",
  engagementId: "3f2b8c1e-9a47-4d56-8e0f-0123456789ab",
  engagementNumber: 1042,
  sequence: 0,
  authority: { name: "Brume Air Unit", email: "desk@brume.invalid", timeZone: "Europe/Zurich" },
  because: "it is asked about every engagement at Alder Point",
  station: { name: "Alder Point", latitudeDeg: 46.5, longitudeDeg: -8.2, altitudeM: 1400 },
  fragment: { name: "Fragment 88001", number: "catalogue number 88001" },
  laser: { wavelengthNm: 1064, pulseEnergyJ: 20_000, pulseWidthNs: 5, repetitionRateHz: 10, apertureM: 8 },
  dwellFromMs: Date.UTC(2031, 3, 6, 3, 12, 45),
  dwellToMs: Date.UTC(2031, 3, 6, 3, 14, 45),
  formerFromMs: null,
  formerToMs: null,
  beam: {
    start: { azimuthDeg: 201.34, elevationDeg: 35.21, rangeKm: 1203.4 },
    end: { azimuthDeg: 290.06, elevationDeg: 61.8, rangeKm: 905.5 },
    minElevationDeg: 35.21,
    maxElevationDeg: 61.8,
  },
  planner: { name: "Plan Ner", email: "plan.ner@example.invalid" },
  change: null,
  reason: null,
  fired: null,
  answerByMs: Date.UTC(2031, 3, 6, 2, 52, 45),
  link: "https://book.example.invalid/answer/abc.def",
  engagementUrl: "https://book.example.invalid/engagements/3f2b8c1e-9a47-4d56-8e0f-0123456789ab",
};
