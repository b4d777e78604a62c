#include "cli/report/assets.h"

#include <stdexcept>

#include "cli/embedded.h"

namespace focalframe::cli {

const std::string& asset(const std::string& name) {
  for (const EmbeddedText& file : report_assets())
    if (file.name == name) return file.text;
  throw std::logic_error("no such part of the report: " + name);
}

}  // namespace focalframe::cli
