namespace TensorRG.Tensors;

/// <summary>Direction of a leg: whether its charge flows into the tensor or out of it.</summary>
public enum Arrow
{
    /// <summary>The charge counts positively in the conservation law.</summary>
    In = 1,

    /// <summary>The charge counts negatively.</summary>
    Out = -1,
}
