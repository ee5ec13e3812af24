#include "tests/support/invented_records.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <functional>
#include <stdexcept>

namespace pilotis {

namespace {

using Write = std::function<std::string(double)>;

Write fixed(int width, int decimals) {
  return [=](double value) { return fmt::format("{:{}.{}f}", value, width, decimals); };
}

// One digit before the point and an exponent of two digits.
Write scientific(int width, int decimals) {
  return [=](double value) { return fmt::format("{:{}.{}E}", value, width, decimals); };
}

// As SMC writes it: an exponent of one digit.
std::string one_digit_exponent(double value) {
  std::string text = fmt::format("{:.4E}", value);  // -2.1458E+00
  text.erase(text.size() - 2, 1);
  return fmt::format("{:>10}", text);
}

std::string rows(const Samples& samples, std::size_t per_row, const Write& write) {
  std::string text;
  for (std::size_t i = 0; i < samples.size(); ++i) {
    text += write(samples[i]);
    if ((i + 1) % per_row == 0 || i + 1 == samples.size()) text += '\n';
  }
  return text;
}

std::string integers(std::size_t count, std::size_t per_row, int width, const std::vector<std::pair<int, long>>& set,
                     long otherwise = 0) {
  std::string text;
  for (std::size_t i = 1; i <= count; ++i) {
    long value = otherwise;
    for (const auto& [number, wanted] : set)
      if (number == static_cast<int>(i)) value = wanted;
    text += fmt::format("{:{}}", value, width);
    if (i % per_row == 0 || i == count) text += '\n';
  }
  return text;
}

std::string reals(std::size_t count, std::size_t per_row, const Write& write,
                  const std::vector<std::pair<int, double>>& set, double otherwise = 0) {
  Samples values(count, otherwise);
  for (const auto& [number, wanted] : set) values[static_cast<std::size_t>(number) - 1] = wanted;
  return rows(values, per_row, write);
}

double peak_of(const Samples& samples) {
  double peak = 0;
  for (double value : samples)
    if (std::abs(value) > std::abs(peak)) peak = value;
  return peak;
}

std::string lines(std::size_t count, std::string_view text) {
  std::string all;
  for (std::size_t i = 0; i < count; ++i) all += fmt::format("{}\n", text);
  return all;
}

std::string channel_of_csmip(int channel, std::string_view name, const Samples& samples) {
  const std::size_t n = samples.size();
  const std::string block = rows(samples, 8, fixed(10, 3));
  return fmt::format("Corrected accelerogram   Invented   Chan  {}: {} from\n", channel, name) + lines(6, "Invented") +
         fmt::format("Chan  {}: {}  (Sta Chn: 14)\n", channel, name) + lines(7, "Invented") +
         fmt::format("  {} points of instrument- and baseline-corrected accel, veloc and displ data\n", n) +
         "at equally-spaced intervals of    .010  sec.\n" +
         fmt::format("Peak acceleration = {:9.3f}    cm/sec/sec  at    6.820   sec.\n", peak_of(samples)) +
         lines(7, "Invented") + integers(100, 16, 5, {{1, 13043}, {2, 13043}}) +
         reals(100, 8, fixed(10, 3), {{1, 0.037}}) +
         fmt::format("{:5} points of accel data equally spaced at  .010 sec, in cm/sec2. (8f10.3)\n{}", n, block) +
         fmt::format("{:5} points of veloc data equally spaced at  .010 sec, in cm/sec. (8f10.3)\n{}", n, block) +
         fmt::format("{:5} points of displ data equally spaced at  .010 sec, in cm. (8f10.3)\n{}", n, block) +
         fmt::format("/&  ----------  End of data for channel  {}  ----------\n", channel);
}

std::string head_of_volume1(std::string_view name, std::size_t points, std::string_view units) {
  return "Uncorrected accelerogram data      Processed: invented\n" + lines(5, "Invented") +
         fmt::format("Chan  1: {}   (Sta Chn:  1)\nInvented\n", name) + lines(2, "Instr Period = 0.0391 sec") +
         fmt::format("No. of points = {:6}  Record length = 35.000 sec\n{}\n", points, units) +
         "RMS accel of complete record = 0.010 g\n" + integers(100, 16, 5, {}) + reals(50, 8, fixed(10, 3), {});
}

std::string component_of_geonet(std::string_view name, const Samples& samples) {
  const auto n = static_cast<long>(samples.size());
  return "Corrected accelerogram INVENTED_20 GNS Science\n" + lines(9, "Invented") +
         fmt::format(
             "Instrument corrected data at 0.020 sec intervals\nInvented\nComponent {}  Accelerometer Axis\n"
             "Acceleration:  peak {:8.1f} mm/s/s at  43.68 sec     rms      2.2 mm/s/s\nVelocity:\n"
             "Displacement:\n",
             name, peak_of(samples)) +
         integers(40, 10, 8, {{34, n}, {35, n}, {36, n}}) +
         reals(60, 10, fixed(8, 4), {{25, 0.005}, {26, 0.02}, {30, 9806.6}}) + rows(samples, 10, fixed(8, 1)) +
         rows(samples, 10, fixed(8, 2)) + rows(samples, 10, fixed(8, 2));
}

std::string table(const Samples& samples, std::size_t columns, const Write& write, double step = 0) {
  std::string text;
  for (std::size_t i = 0; i < samples.size(); ++i) {
    if (step > 0) text += fmt::format("{:10.3f}", static_cast<double>(i) * step);
    for (std::size_t column = 0; column < columns; ++column) text += write(samples[i]);
    text += '\n';
  }
  return text;
}

}  // namespace

std::string invented_peer(const Samples& in_g) {
  return "PEER NGA STRONG MOTION DATABASE RECORD\nInvented, 1/1/1901, Nowhere, 90\n"
         "ACCELERATION TIME SERIES IN UNITS OF G\n" +
         fmt::format("NPTS={:7}, DT=   .0100 SEC,\n", in_g.size()) + rows(in_g, 5, scientific(15, 7));
}

std::string invented_cosmos(const Samples& in_cm_s2) {
  return "Corrected acceleration    (Format v01.20 with 13 text lines)\n" + lines(7, "Invented") +
         "Sta Chan   1: 90 Deg (Rcrdr Chan  ?) Location:Basement\n" + lines(3, "Invented") +
         "Values used when parameter or data value is unknown/unspecified:   -999, -999.00\n"
         " 100 Integer-header values follow on  10 lines, Format= (10I8)\n" +
         integers(100, 10, 8, {{1, 2}, {3, 4}}, -999) +
         " 100 Real-header values follow on  20 lines, Format= (5F15.6)\n" +
         reals(100, 5, fixed(15, 6), {{34, 0.02}, {62, 10.0}, {64, peak_of(in_cm_s2)}}, -999) +
         "   1 Comment line(s) follow, each starting with a \"|\":\n|<SCNL>NONE.HNE.XX.01    <AUTH>\n" +
         fmt::format("{:8} acceleration pts, approx  210 secs, units=cm/sec2(04),Format=(8f10.4)\n", in_cm_s2.size()) +
         rows(in_cm_s2, 8, fixed(10, 4)) + "End-of-data for ChanHNE acceleration\n";
}

std::string invented_smc(const Samples& in_cm_s2) {
  const auto [low, high] = std::minmax_element(in_cm_s2.begin(), in_cm_s2.end());
  return "2 CORRECTED ACCELEROGRAM\n" + lines(4, "*") + "station = Nowhere                        component=     90\n" +
         lines(5, "*") +
         integers(48, 8, 10, {{13, 90}, {14, 90}, {16, 1}, {17, static_cast<long>(in_cm_s2.size())}}, -32768) +
         reals(
             50, 5, [](double value) { return value == 0.17e39 ? "  0.1700000E+39" : fmt::format("{:15.7E}", value); },
             {{2, 100}, {30, *high}, {32, *low}}, 0.17e39) +
         "|invented\n" + rows(in_cm_s2, 8, one_digit_exponent);
}

std::string invented_geonet(const Samples& in_mm_s2) {
  return component_of_geonet("S16W", in_mm_s2) + component_of_geonet("S74E", in_mm_s2) +
         component_of_geonet("Up", in_mm_s2);
}

std::string invented_csmip_volume2(const Samples& in_cm_s2) {
  return channel_of_csmip(1, "90 Deg", in_cm_s2) + channel_of_csmip(2, "Up", in_cm_s2) + "\x1A\x1A\x1A";
}

std::string invented_csmip_volume1(const Samples& in_g) {
  return head_of_volume1("90 Deg", in_g.size(), "Units of uncor accel are g.") +
         fmt::format("{:6} points at 100 pts/sec, in g. (8f9.6)\n", in_g.size()) + rows(in_g, 8, fixed(9, 6)) +
         "/&  ----------  End of data for channel  1  ----------\n";
}

std::string invented_csmip_volume1_pairs(const Samples& in_tenth_g) {
  Samples pairs;
  for (std::size_t i = 0; i < in_tenth_g.size(); ++i) {
    pairs.push_back(static_cast<double>(i) * 0.01);
    pairs.push_back(in_tenth_g[i]);
  }
  const std::string units = fmt::format("Units of uncor accel are sec and g/10.     Max  ={:7.4f} g, at   3.910 sec",
                                        peak_of(in_tenth_g) / 10);
  return head_of_volume1("90 Deg", in_tenth_g.size(), units) + rows(pairs, 10, fixed(7, 3)) +
         "/&  ----------  End of data for channel  1  ----------\n";
}

std::string invented_knet(const Samples& in_counts) {
  return fmt::format(
             "Origin Time       1901/01/01 00:00:00\nLat.              0.0\nLong.             0.0\nDepth. (km)       "
             "1\n"
             "Mag.              1.0\nStation Code      NONE\nStation Lat.      0\nStation Long.     0\n"
             "Station Height(m) 0\nRecord Time       1901/01/01 00:00:00\nSampling Freq(Hz) 100Hz\n"
             "Duration Time(s)  {}\nDir.              E-W\nScale Factor      2000(gal)/2000000\n"
             "Max. Acc. (gal)   {:.3f}\nLast Correction   1901/01/01 00:00:00\nMemo.\n",
             static_cast<double>(in_counts.size()) / 100, std::abs(peak_of(in_counts)) / 1000) +
         rows(in_counts, 8, fixed(9, 0));
}

std::string invented_esm_dyna(const Samples& in_cm_s2) {
  std::string text = "EVENT_NAME: Invented\nEVENT_ID: a:b:c\n" + lines(26, "EMPTY_VALUE: ");
  text += fmt::format("SAMPLING_INTERVAL_S: 0.010000\nNDATA: {}\nDURATION_S: \nSTREAM: HNE\nUNITS: cm/s^2\n",
                      in_cm_s2.size());
  text += lines(6, "EMPTY_VALUE: ") + fmt::format("PGA_CM/S^2: {:.6f}\n", peak_of(in_cm_s2));
  text += lines(8, "EMPTY_VALUE: ") + "DATA_TYPE: ACCELERATION\n" + lines(10, "EMPTY_VALUE: ");
  for (int i = 1; i <= 5; ++i) text += fmt::format("USER{}: \n", i);
  return text + rows(in_cm_s2, 1, fixed(0, 6));
}

std::string invented_itaca(const Samples& in_m_s2) {
  return fmt::format(
             "Event Date & Time             : 1901-01-01 00:00:00\nStation Code / Name           : 1 / Nowhere\n"
             "Network                       : Invented\nOrientation                   : NS\n"
             "Processing Info               : none\nFilter Cut-off Frequency (Hz) : 0.100 - 18.000\n"
             "Time Increment (s)            : 0.010\nNumber of Data                : {}\n"
             "PGA (m/s/s)                   : {:.7E}\nAccelaration time series in m/s/s\n",
             in_m_s2.size(), std::abs(peak_of(in_m_s2))) +
         rows(in_m_s2, 5, scientific(14, 7));
}

std::string invented_afad(const Samples& in_gal) {
  return fmt::format(
             "STRONG GROUND MOTION RECORDS OF TURKIYE\nPLACE                     : \xC7\xDE\n"
             "NUMBER OF DATA            : {}\nSAMPLING INTERVAL (sec)   : 0.0100\n"
             "RAW PGA VALUES (gal)      : (N-S) 1.0 (E-W) 1.0 (U-D) 1.0\n\n         N-S        E-W        U-D\n",
             in_gal.size()) +
         table(in_gal, 3, fixed(12, 4));
}

std::string invented_asa(const Samples& in_gal) {
  const std::size_t n = in_gal.size();
  std::string text = lines(6, "***") +
                     "ARCHIVO ESTANDAR DE ACELERACION:\nVERSION DEL FORMATO                    : 2.0\n" +
                     lines(20, "                                       :");
  text += fmt::format(
      "NUMERO DE CANALES                      : 3\nORIENTACION C1-C6 (rumbo;orientacion)  : /V/N90E/N00E\n"
      "ORIENTACION C7-C12 (rumbo;orientacion) :\nINTERVALO DE MUESTREO, C1-C6 (s)       : /0.01/0.01/0.01\n"
      "INTERVALO DE MUESTREO, C7-C12 (s)      :\nNUM. TOTAL DE MUESTRAS, C1-C6          : /{0}/{0}/{0}\n"
      "NUM. TOTAL DE MUESTRAS, C7-C12         :\nACEL. MAX.(Gal), C1-C6                 : /{1:.2f}/{1:.2f}/{1:.2f}\n"
      "ACEL. MAX.(Gal), C7-C12                :\nUNIDADES DE LOS DATOS                  : Gal (cm/s/s)\n"
      "FORMATO DATOS (FORTRAN,10 campos/dato) : 3F10.2\n",
      n, peak_of(in_gal));
  text += lines(65, "") +
          "DATOS DE ACELERACION:\n---------+---------+\n   CANAL-1   CANAL-2   CANAL-3\n"
          "         V      N90E      N00E\n---------+---------+\n";
  return text + table(in_gal, 3, fixed(10, 2));
}

std::string invented_cwb(const Samples& in_gal) {
  const auto [low, high] = std::minmax_element(in_gal.begin(), in_gal.end());
  std::string text = fmt::format(
      "#Earthquake Information\n#Depth(km): 10.0\n\n#RecordLength(sec): {}\n"
      "#SampleRate(Hz): 100\n#AmplitudeUnit:  gal. DCoffset(corr)\n",
      static_cast<double>(in_gal.size()) / 100);
  for (const char* name : {"U", "N", "E"})
    text += fmt::format("#AmplitudeMAX. {}: {:8.3f}~ {:8.3f}\n", name, *high, *low);
  return text + "#DataSequence: Time U(+); N(+); E(+)\n#Data: 4F10.3\n" + table(in_gal, 3, fixed(10, 3), 0.01);
}

std::string invented_bhrc(const Samples& in_tenth_g) {
  std::string text;
  for (const char* name : {"L1", "V2", "T3"})
    text += "* VOL1DS FILE:  0000/01\nInvented\nInvented\n\nL\n\n" +
            fmt::format(
                "COMP {}\nNowhere   Station   0.0 N 0.0 E   Azimuth L 50    T 140\nInvented\nInvented\n"
                "NO. OF POINTS = {:6}      DURATION = {:7.3f}\nUNITS ARE SECONDS AND G/10\n\n",
                name, in_tenth_g.size(), static_cast<double>(in_tenth_g.size()) / 100) +
            integers(100, 16, 5, {}) + reals(42, 6, scientific(13, 6), {{7, 100}}) +
            rows(in_tenth_g, 10, scientific(13, 6)) + "/&\n";
  return text;
}

std::string invented_csmnc(const Samples& in_cm_s2) {
  return "000000\n" + lines(8, "INVENTED") + "COMP. EW\nUNCORRECTED ACCELERATION          UNIT: CM/SEC/SEC\n" +
         fmt::format(
             "NO. OF POINTS: {:5}  EQUALLY SPACED INTERVALS OF:  0.010  SEC\n"
             "PEAK VALUE: {:8.3f}   AT   22.89 SEC    DURATION:  44 SEC\n",
             in_cm_s2.size(), std::abs(peak_of(in_cm_s2))) +
         "INVENTED\nCSMNC\n\n" + rows(in_cm_s2, 8, scientific(14, 6));
}

const std::vector<InventedFormat>& invented_formats() {
  static const std::vector<InventedFormat> formats{
      {"PEER database header", "g", 0.01, 1, invented_peer},
      {"COSMOS v1.20", "cm/s2", 0.01, 1, invented_cosmos},
      {"SMC", "cm/s2", 0.01, 1, invented_smc},
      {"GeoNet volume 2", "mm/s2", 0.02, 3, invented_geonet},
      {"CSMIP volume 2 (.V2)", "cm/s2", 0.01, 2, invented_csmip_volume2},
      {"CSMIP volume 1 (.V1)", "g", 0.01, 1, invented_csmip_volume1},
      {"CSMIP volume 1 (.V1)", "g/10", 0.01, 1, invented_csmip_volume1_pairs},
      {"K-NET / KiK-net", "gal/1000", 0.01, 1, invented_knet},
      {"ESM / ITACA DYNA", "cm/s2", 0.01, 1, invented_esm_dyna},
      {"ITACA .cor.acc", "m/s2", 0.01, 1, invented_itaca},
      {"AFAD", "gal", 0.01, 3, invented_afad},
      {"ASA 2.0", "gal", 0.01, 3, invented_asa},
      {"CWB", "gal", 0.01, 3, invented_cwb},
      {"BHRC volume 1", "g/10", 0.01, 3, invented_bhrc},
      {"CSMNC", "cm/s2", 0.01, 1, invented_csmnc},
  };
  return formats;
}

std::string with(std::string text, std::string_view from, std::string_view to) {
  const std::size_t at = text.find(from);
  if (at == std::string::npos) throw std::logic_error(fmt::format("\"{}\" is not in the invented file", from));
  return text.replace(at, from.size(), to);
}

std::string with_cr_lf(std::string_view text) {
  std::string result;
  for (char c : text) {
    if (c == '\n') result += '\r';
    result += c;
  }
  return result;
}

}  // namespace pilotis
