#include <string>
#include <vector>

#include "cli/command_line.h"

int main(int argc, char** argv) {
  return focalframe::cli::run_command_line({argv + (argc > 0 ? 1 : 0), argv + argc});
}
