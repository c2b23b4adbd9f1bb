// One row of a stock becomes a part: every cell is read, every fault is told.
#pragma once

#include <bandwright/catalogue.hpp>
#include <map>
#include <optional>
#include <string>
#include <vector>

#include "catalogue/fault_list.hpp"
#include "catalogue/stock_rows.hpp"

namespace bandwright {

const char* word(PartKind kind);  ///< "resistor"

class StockPartReader {
public:
  /// Both must outlive the reader.
  StockPartReader(const Catalogue& catalogue, FaultList& faults);

  /// The part, or none where a cell is at fault.
  std::optional<StockPart> read(const StockRow& row);

private:
  void refuse(const StockRow& row, StockColumn column, const std::string& expected,
              const std::vector<std::string>& known = {});
  std::optional<PartKind> read_kind(const StockRow& row);
  void read_type(const StockRow& row, StockPart& part);
  void read_value(const StockRow& row, StockPart& part);
  void read_tolerance_cell(const StockRow& row, StockPart& part);
  void read_rating_cell(const StockRow& row, StockPart& part);
  void read_family(const StockRow& row, StockPart& part);
  void read_quantity_cell(const StockRow& row, StockPart& part);
  void read_unit_cost(const StockRow& row, StockPart& part);
  void leave_to_the_type(const StockRow& row);

  const Catalogue& catalogue_;
  FaultList& faults_;
  std::map<std::string, const Family*> families_;  // by key and by name
  std::map<std::string, std::string> types_;       // in small letters
};

}  // namespace bandwright
