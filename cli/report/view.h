#pragma once

/// The frame to be turned about in a browser: data and controls of cli/report/assets/view.js.

#include <string>

#include "models/portrait.h"

namespace focalframe::cli {

/// HTML of the view's place in the page. `first`: index of the state shown first.
std::string view_html(const models::Portrait& portrait, std::size_t first);

/// HTML of the scripts, to stand at the page's end. With the library's licence line.
std::string view_script();

/// How many times the motions of one state are drawn larger: a round number that brings the greatest to about
/// a tenth of the aperture; at least 1.
double drawn_scale(const models::Portrait& portrait, std::size_t state);

}  // namespace focalframe::cli
