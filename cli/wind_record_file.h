#pragma once

/// An hourly wind record as CSV: a header line that names columns with their units, one line per hour.
///
///   speed [m/s], direction [deg], beam [W/m2]
///   3.4, 210, 0
///
/// speed: m/s, km/h, mph or kn. direction (optional): where the wind comes from, clockwise from north. beam
/// (optional): irradiance on a surface that faces the sun. An empty cell is a gap. Other columns are passed
/// over. Lines that begin with # are comments. The columns may be parted by commas, semicolons or tabs.

#include <string>
#include <vector>

#include "cli/messages.h"
#include "models/wind_price.h"

namespace focalframe::cli {

/// Everything wrong at once goes to `messages`; the record is sound when none of them is a STOP.
models::WindRecord parse_wind_record(const std::string& text, const std::string& name,
                                     std::vector<Message>& messages);

/// Path as written in the design: beside the design unless absolute.
models::WindRecord read_wind_record(const std::string& path, const std::string& design_path,
                                    std::vector<Message>& messages);

}  // namespace focalframe::cli
