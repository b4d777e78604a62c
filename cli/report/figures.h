#pragma once

/// The figures of a trough's report that need no more than the assessment itself.

#include <string>
#include <vector>

#include "cli/report/drawing.h"
#include "models/assessment.h"

namespace focalframe::cli {

struct Figure {
  std::string key;      ///< name of its file, without ending
  std::string title;    ///< what it shows
  std::string caption;  ///< how to read it; one or two sentences
  Drawing drawing;
};

Figure limits_figure(const models::Assessment& a);  ///< how much of every limit is used
Figure light_figure(const models::Assessment& a);   ///< light caught over elevation, calm and both winds
Figure loss_figure(const models::Assessment& a);    ///< what each part of the deformation costs
Figure twist_figure(const models::Assessment& a);   ///< twist along the row in the governing state
Figure use_figure(const models::Assessment& a);     ///< stress of every group of members
Figure torque_figure(const models::Assessment& a);  ///< drive torque over elevation

/// All of the above that have something to show, in the order of the report.
std::vector<Figure> figures_of(const models::Assessment& a);

}  // namespace focalframe::cli
