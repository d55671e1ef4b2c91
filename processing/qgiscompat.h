// SPDX-License-Identifier: GPL-2.0-or-later
// The QGIS names that differ between 3.22 and newer versions, given one spelling each; nowhere else is the version
// asked. Where only the type moved and the enumerator kept its name, `Alias::Name` works on all versions. Flag
// unions start from the flags type (`compat::LayerFilters( a ) | b`), since the old enums decay to int. Checked
// against 3.22 and 3.40; the steps between follow QGIS's own notes on when a name moved.
#pragma once

#include <qgis.h>
#include <qgsattributeeditorcontainer.h>
#include <qgscolorrampshader.h>
#include <qgscoordinatereferencesystem.h>
#include <qgseditformconfig.h>
#include <qgsfeaturerequest.h>
#include <qgsfield.h>
#include <qgslinesymbollayer.h>
#include <qgsmaplayerproxymodel.h>
#include <qgsmarkersymbollayer.h>
#include <qgspallabeling.h>
#include <qgsprocessingalgorithm.h>
#include <qgsprocessingparameters.h>
#include <qgsprocessingprovider.h>
#include <qgsraster.h>
#include <qgsrasterbandstats.h>
#include <qgssnappingconfig.h>
#include <qgstaskmanager.h>
#include <qgsunittypes.h>
#include <qgswkbtypes.h>

#include <QMetaType>
#include <QVariant>

#include <initializer_list>

namespace stillhead::compat
{

#if _QGIS_VERSION_INT >= 33600

  using SourceType = Qgis::ProcessingSourceType;
  struct Source
  {
      static constexpr SourceType AnyGeometry = SourceType::VectorAnyGeometry;
      static constexpr SourceType Point = SourceType::VectorPoint;
      static constexpr SourceType Line = SourceType::VectorLine;
      static constexpr SourceType Polygon = SourceType::VectorPolygon;
      static constexpr SourceType Table = SourceType::Vector;
      static constexpr SourceType Raster = SourceType::Raster;
  };

  using AlgorithmFlags = Qgis::ProcessingAlgorithmFlags;
  using AlgorithmFlag = Qgis::ProcessingAlgorithmFlag;
  struct Algorithm
  {
      static constexpr AlgorithmFlag CanCancel = AlgorithmFlag::CanCancel;
      static constexpr AlgorithmFlag SupportsBatch = AlgorithmFlag::SupportsBatch;
      static constexpr AlgorithmFlag RequiresProject = AlgorithmFlag::RequiresProject;
      static constexpr AlgorithmFlag NoThreading = AlgorithmFlag::NoThreading;
  };

  using ProviderFlags = Qgis::ProcessingProviderFlags;

  //! Says that the provider's algorithms read QGIS's virtual rasters too; older versions do not ask.
  inline ProviderFlags readsVirtualRasters()
  {
    return Qgis::ProcessingProviderFlag::CompatibleWithVirtualRaster;
  }

  using ParameterFlags = Qgis::ProcessingParameterFlags;
  using ParameterFlag = Qgis::ProcessingParameterFlag;
  struct Parameter
  {
      static constexpr ParameterFlag Advanced = ParameterFlag::Advanced;
      static constexpr ParameterFlag Hidden = ParameterFlag::Hidden;
      static constexpr ParameterFlag Optional = ParameterFlag::Optional;
  };

  using NumberType = Qgis::ProcessingNumberParameterType;
  using FieldParameterType = Qgis::ProcessingFieldParameterDataType;
  using FileBehavior = Qgis::ProcessingFileParameterBehavior;
  using RequestFlag = Qgis::FeatureRequestFlag;
  using RequestFlags = Qgis::FeatureRequestFlags;

  using InvalidGeometryCheck = Qgis::InvalidGeometryCheck;
  struct GeometryCheck
  {
      static constexpr InvalidGeometryCheck No = InvalidGeometryCheck::NoCheck;
      static constexpr InvalidGeometryCheck Skip = InvalidGeometryCheck::SkipInvalid;
      static constexpr InvalidGeometryCheck Abort = InvalidGeometryCheck::AbortOnInvalid;
  };

  using BandStatistic = Qgis::RasterBandStatistic;
  using BandStatistics = Qgis::RasterBandStatistics;

  using SymbolProperty = QgsSymbolLayer::Property;
  struct Symbol
  {
      static constexpr SymbolProperty Size = SymbolProperty::Size;
      static constexpr SymbolProperty Angle = SymbolProperty::Angle;
      static constexpr SymbolProperty FillColor = SymbolProperty::FillColor;
      static constexpr SymbolProperty StrokeColor = SymbolProperty::StrokeColor;
      static constexpr SymbolProperty StrokeWidth = SymbolProperty::StrokeWidth;
      static constexpr SymbolProperty LayerEnabled = SymbolProperty::LayerEnabled;
  };

#else

  using SourceType = QgsProcessing::SourceType;
  struct Source
  {
      static constexpr SourceType AnyGeometry = QgsProcessing::TypeVectorAnyGeometry;
      static constexpr SourceType Point = QgsProcessing::TypeVectorPoint;
      static constexpr SourceType Line = QgsProcessing::TypeVectorLine;
      static constexpr SourceType Polygon = QgsProcessing::TypeVectorPolygon;
      static constexpr SourceType Table = QgsProcessing::TypeVector;
      static constexpr SourceType Raster = QgsProcessing::TypeRaster;
  };

  using AlgorithmFlags = QgsProcessingAlgorithm::Flags;
  using AlgorithmFlag = QgsProcessingAlgorithm::Flag;
  struct Algorithm
  {
      static constexpr AlgorithmFlag CanCancel = QgsProcessingAlgorithm::FlagCanCancel;
      static constexpr AlgorithmFlag SupportsBatch = QgsProcessingAlgorithm::FlagSupportsBatch;
      static constexpr AlgorithmFlag RequiresProject = QgsProcessingAlgorithm::FlagRequiresProject;
      static constexpr AlgorithmFlag NoThreading = QgsProcessingAlgorithm::FlagNoThreading;
  };

  using ProviderFlags = QgsProcessingProvider::Flags;

  inline ProviderFlags readsVirtualRasters()
  {
    return {};
  }

  using ParameterFlags = QgsProcessingParameterDefinition::Flags;
  using ParameterFlag = QgsProcessingParameterDefinition::Flag;
  struct Parameter
  {
      static constexpr ParameterFlag Advanced = QgsProcessingParameterDefinition::FlagAdvanced;
      static constexpr ParameterFlag Hidden = QgsProcessingParameterDefinition::FlagHidden;
      static constexpr ParameterFlag Optional = QgsProcessingParameterDefinition::FlagOptional;
  };

  using NumberType = QgsProcessingParameterNumber::Type;
  using FieldParameterType = QgsProcessingParameterField::DataType;
  using FileBehavior = QgsProcessingParameterFile::Behavior;
  using RequestFlag = QgsFeatureRequest::Flag;
  using RequestFlags = QgsFeatureRequest::Flags;

  using InvalidGeometryCheck = QgsFeatureRequest::InvalidGeometryCheck;
  struct GeometryCheck
  {
      static constexpr InvalidGeometryCheck No = QgsFeatureRequest::GeometryNoCheck;
      static constexpr InvalidGeometryCheck Skip = QgsFeatureRequest::GeometrySkipInvalid;
      static constexpr InvalidGeometryCheck Abort = QgsFeatureRequest::GeometryAbortOnInvalid;
  };

  using BandStatistic = QgsRasterBandStats::Stats;
  using BandStatistics = int;

  using SymbolProperty = QgsSymbolLayer::Property;
  struct Symbol
  {
      static constexpr SymbolProperty Size = QgsSymbolLayer::PropertySize;
      static constexpr SymbolProperty Angle = QgsSymbolLayer::PropertyAngle;
      static constexpr SymbolProperty FillColor = QgsSymbolLayer::PropertyFillColor;
      static constexpr SymbolProperty StrokeColor = QgsSymbolLayer::PropertyStrokeColor;
      static constexpr SymbolProperty StrokeWidth = QgsSymbolLayer::PropertyStrokeWidth;
      static constexpr SymbolProperty LayerEnabled = QgsSymbolLayer::PropertyLayerEnabled;
  };

#endif

  //! Source types as the vector and feature-source parameters take them.
  inline QList<int> sourceTypes( std::initializer_list<SourceType> types )
  {
    QList<int> list;
    for ( SourceType type : types )
      list << static_cast<int>( type );
    return list;
  }

#if _QGIS_VERSION_INT >= 33800
  using FieldType = QMetaType::Type;
  struct Field
  {
      static constexpr FieldType Bool = QMetaType::Bool;
      static constexpr FieldType Int = QMetaType::Int;
      static constexpr FieldType LongLong = QMetaType::LongLong;
      static constexpr FieldType Double = QMetaType::Double;
      static constexpr FieldType String = QMetaType::QString;
  };
  using ShaderInterpolation = Qgis::ShaderInterpolationMethod;
  struct Shader
  {
      static constexpr ShaderInterpolation Linear = ShaderInterpolation::Linear;
      static constexpr ShaderInterpolation Discrete = ShaderInterpolation::Discrete;
      static constexpr ShaderInterpolation Exact = ShaderInterpolation::Exact;
  };
  using ShaderClassification = Qgis::ShaderClassificationMethod;
#else
  using FieldType = QVariant::Type;
  struct Field
  {
      static constexpr FieldType Bool = QVariant::Bool;
      static constexpr FieldType Int = QVariant::Int;
      static constexpr FieldType LongLong = QVariant::LongLong;
      static constexpr FieldType Double = QVariant::Double;
      static constexpr FieldType String = QVariant::String;
  };
  using ShaderInterpolation = QgsColorRampShader::Type;
  struct Shader
  {
      static constexpr ShaderInterpolation Linear = QgsColorRampShader::Interpolated;
      static constexpr ShaderInterpolation Discrete = QgsColorRampShader::Discrete;
      static constexpr ShaderInterpolation Exact = QgsColorRampShader::Exact;
  };
  using ShaderClassification = QgsColorRampShader::ClassificationMode;
#endif

  //! A null attribute of the given type.
  inline QVariant nullOf( FieldType type )
  {
    return QVariant( static_cast<QVariant::Type>( type ) );
  }

#if _QGIS_VERSION_INT >= 33400
  using LayerFilter = Qgis::LayerFilter;
  using LayerFilters = Qgis::LayerFilters;
#else
  using LayerFilter = QgsMapLayerProxyModel::Filter;
  using LayerFilters = QgsMapLayerProxyModel::Filters;
#endif

#if _QGIS_VERSION_INT >= 33000
  using WkbType = Qgis::WkbType;
  using GeometryType = Qgis::GeometryType;
  struct Geometry
  {
      static constexpr GeometryType Point = GeometryType::Point;
      static constexpr GeometryType Line = GeometryType::Line;
      static constexpr GeometryType Polygon = GeometryType::Polygon;
  };
  using LayerType = Qgis::LayerType;
  struct Layer
  {
      static constexpr LayerType Vector = LayerType::Vector;
      static constexpr LayerType Raster = LayerType::Raster;
  };
  using DistanceUnit = Qgis::DistanceUnit;
  struct Distance
  {
      static constexpr DistanceUnit Metres = DistanceUnit::Meters;
      static constexpr DistanceUnit Feet = DistanceUnit::Feet;
      static constexpr DistanceUnit Degrees = DistanceUnit::Degrees;
  };
  using RenderUnit = Qgis::RenderUnit;
  struct Render
  {
      static constexpr RenderUnit Millimetres = RenderUnit::Millimeters;
      static constexpr RenderUnit MapUnits = RenderUnit::MapUnits;
      static constexpr RenderUnit Points = RenderUnit::Points;
  };
  using LayoutUnit = Qgis::LayoutUnit;
  struct Layout
  {
      static constexpr LayoutUnit Millimetres = LayoutUnit::Millimeters;
  };
  using IdentifyFormat = Qgis::RasterIdentifyFormat;
  struct Identify
  {
      static constexpr IdentifyFormat Value = IdentifyFormat::Value;
  };
#else
  using WkbType = QgsWkbTypes::Type;
  using GeometryType = QgsWkbTypes::GeometryType;
  struct Geometry
  {
      static constexpr GeometryType Point = QgsWkbTypes::PointGeometry;
      static constexpr GeometryType Line = QgsWkbTypes::LineGeometry;
      static constexpr GeometryType Polygon = QgsWkbTypes::PolygonGeometry;
  };
  using LayerType = QgsMapLayerType;
  struct Layer
  {
      static constexpr LayerType Vector = QgsMapLayerType::VectorLayer;
      static constexpr LayerType Raster = QgsMapLayerType::RasterLayer;
  };
  using DistanceUnit = QgsUnitTypes::DistanceUnit;
  struct Distance
  {
      static constexpr DistanceUnit Metres = QgsUnitTypes::DistanceMeters;
      static constexpr DistanceUnit Feet = QgsUnitTypes::DistanceFeet;
      static constexpr DistanceUnit Degrees = QgsUnitTypes::DistanceDegrees;
  };
  using RenderUnit = QgsUnitTypes::RenderUnit;
  struct Render
  {
      static constexpr RenderUnit Millimetres = QgsUnitTypes::RenderMillimeters;
      static constexpr RenderUnit MapUnits = QgsUnitTypes::RenderMapUnits;
      static constexpr RenderUnit Points = QgsUnitTypes::RenderPoints;
  };
  using LayoutUnit = QgsUnitTypes::LayoutUnit;
  struct Layout
  {
      static constexpr LayoutUnit Millimetres = QgsUnitTypes::LayoutMillimeters;
  };
  using IdentifyFormat = QgsRaster::IdentifyFormat;
  struct Identify
  {
      static constexpr IdentifyFormat Value = QgsRaster::IdentifyFormatValue;
  };
#endif

#if _QGIS_VERSION_INT >= 32600
  using LabelPlacement = Qgis::LabelPlacement;
#else
  using LabelPlacement = QgsPalLayerSettings::Placement;
#endif

#if _QGIS_VERSION_INT >= 32400
  using MarkerShape = Qgis::MarkerShape;
  using MarkerLinePlacement = Qgis::MarkerLinePlacement;
#else
  using MarkerShape = QgsSimpleMarkerSymbolLayerBase::Shape;
  using MarkerLinePlacement = QgsTemplatedLineSymbolLayerBase::Placement;
#endif

  //! The form of WKT that loses nothing of a CRS.
#if _QGIS_VERSION_INT >= 33600
  constexpr Qgis::CrsWktVariant FULL_WKT = Qgis::CrsWktVariant::Preferred;
#else
  constexpr QgsCoordinateReferenceSystem::WktVariant FULL_WKT = QgsCoordinateReferenceSystem::WKT_PREFERRED;
#endif

  //! Where markers or hashes stand along a line.
  inline void setPlacement( QgsTemplatedLineSymbolLayerBase &layer, MarkerLinePlacement placement )
  {
#if _QGIS_VERSION_INT >= 32400
    layer.setPlacements( placement );
#else
    layer.setPlacement( placement );
#endif
  }

  //! Labels are moved apart where there is room and overlap where there is none, but none is left out.
  inline void keepEveryLabel( QgsPalLayerSettings &settings )
  {
#if _QGIS_VERSION_INT >= 32600
    settings.placementSettings().setOverlapHandling( Qgis::LabelOverlapHandling::AllowOverlapIfRequired );
#else
    settings.displayAll = true;
#endif
  }

  //! Edit forms made of the layer's own groups.
#if _QGIS_VERSION_INT >= 33200
  constexpr Qgis::AttributeFormLayout FORM_BY_GROUPS = Qgis::AttributeFormLayout::DragAndDrop;
#else
  constexpr QgsEditFormConfig::EditorLayout FORM_BY_GROUPS = QgsEditFormConfig::TabLayout;
#endif

  //! The group stands in the form under its heading, not on a tab.
  inline void showAsGroupBox( QgsAttributeEditorContainer &group )
  {
#if _QGIS_VERSION_INT >= 33200
    group.setType( Qgis::AttributeEditorContainerType::GroupBox );
#else
    group.setIsGroupBox( true );
#endif
  }

  //! Ends and lines of all layers catch the pencil within \a pixels.
  inline void snapToAllLayers( QgsSnappingConfig &config, double pixels )
  {
    config.setEnabled( true );
    config.setTolerance( pixels );
#if _QGIS_VERSION_INT >= 32600
    config.setMode( Qgis::SnappingMode::AllLayers );
    config.setTypeFlag( Qgis::SnappingType::Vertex | Qgis::SnappingType::Segment );
#else
    config.setMode( QgsSnappingConfig::AllLayers );
    config.setTypeFlag( static_cast<QgsSnappingConfig::SnappingTypeFlag>(
      QgsSnappingConfig::VertexFlag | QgsSnappingConfig::SegmentFlag ) );
#endif
#if _QGIS_VERSION_INT >= 33200
    config.setUnits( Qgis::MapToolUnit::Pixels );
#else
    config.setUnits( QgsTolerance::Pixels );
#endif
  }

  //! Flags of a task that comes and goes with every edit, and should not be announced where QGIS knows how.
  inline QgsTask::Flags quietTaskFlags()
  {
#if _QGIS_VERSION_INT >= 32600
    return QgsTask::CanCancel | QgsTask::CancelWithoutPrompt | QgsTask::Hidden | QgsTask::Silent;
#else
    return QgsTask::CanCancel | QgsTask::CancelWithoutPrompt;
#endif
  }

} // namespace stillhead::compat
