#pragma once

#include "carlin/core/error.hpp"
#include "carlin/core/types.hpp"

#include <filesystem>
#include <string>
#include <vector>
#include <vtkDataArray.h>
#include <vtkErrorCode.h>
#include <vtkFieldData.h>
#include <vtkNew.h>
#include <vtkStringArray.h>
#include <vtkXMLWriter.h>

namespace carlin
{
/// Adds an array of `rows` x `components`; `fill(row, values)` writes the components of one row.
/// @param name With its unit: "displacement [m]".
template <typename Array, typename Fill>
void add_array(vtkFieldData& to, const std::string& name, std::size_t rows, int components,
               Fill fill)
{
  vtkNew<Array> array;
  array->SetName(name.c_str());
  array->SetNumberOfComponents(components);
  array->SetNumberOfTuples(static_cast<vtkIdType>(rows));
  for (std::size_t row = 0; row < rows; ++row)
    fill(row, array->GetPointer(static_cast<vtkIdType>(row) * components));
  to.AddArray(array);
}

template <typename Text>
void add_texts(vtkFieldData& to, const std::string& name, std::size_t rows, Text text)
{
  vtkNew<vtkStringArray> array;
  array->SetName(name.c_str());
  array->SetNumberOfValues(static_cast<vtkIdType>(rows));
  for (std::size_t row = 0; row < rows; ++row)
    array->SetValue(static_cast<vtkIdType>(row), text(row));
  to.AddArray(array);
}

/// Copies an Eigen vector or matrix into the components of a row, matrices row by row.
template <typename Derived, typename Number>
void put(const Eigen::MatrixBase<Derived>& values, Number* row)
{
  for (Eigen::Index i = 0; i < values.rows(); ++i)
    for (Eigen::Index j = 0; j < values.cols(); ++j)
      *row++ = static_cast<Number>(values(i, j));
}

/// Writes VTK XML with binary data appended, deflated at the fastest level.
/// @throws IoError; VTK 9.1's Write() returns 1 even when nothing could be written, so the error
///   code is read instead.
template <typename Writer, typename Data>
void write_vtk(const std::filesystem::path& file, Data* data)
{
  vtkNew<Writer> writer;
  writer->SetInputData(data);
  writer->SetFileName(file.c_str());
  writer->SetDataModeToAppended();
  writer->EncodeAppendedDataOff();
  writer->SetCompressorTypeToZLib();
  writer->SetCompressionLevel(1);
  writer->SetIdTypeToInt32();
  writer->Write();
  if (writer->GetErrorCode() != vtkErrorCode::NoError)
    throw IoError(file.string() + ": cannot be written (" +
                  vtkErrorCode::GetStringFromErrorCode(writer->GetErrorCode()) + ")");
}
} // namespace carlin
